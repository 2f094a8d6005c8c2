/** A bare Express route that answers a fixed JSON of about a kilobyte: what the API's times are set against. */
import express from 'express';

const items = Array.from({ length: 10 }, (_, at) => ({
  id: at,
  name: `Athlete ${at}`,
  lastSession: '2026-11-28',
  strokes: 6,
}));
const app = express();
app.get('/bare', (_req, res) => res.json({ items, nextCursor: null }));
app.listen(Number(process.argv[2]), '127.0.0.1', () => process.send?.('listening'));
