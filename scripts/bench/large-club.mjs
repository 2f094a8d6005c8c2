import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import Database from 'better-sqlite3';

/**
 * Adds 50 athletes with 200 sessions each (10,000) to the demo coach's squad, every session a copy of one measured demo
 * clip: its strokes and figures, not its file. The server must be stopped. Answers one of the athletes.
 */
export function addLargeClub(dataFolder, { athleteCount = 50, sessionsEach = 200 } = {}) {
  const db = new Database(join(dataFolder, 'stillstroke.sqlite'));
  db.pragma('foreign_keys = ON');
  const model = db
    .prepare(
      `select c.*, a.squad_id, a.club_id from clips c join sessions s on s.id = c.session_id join athletes a on a.id = s.athlete_id
       where exists (select 1 from strokes k join stroke_figures f on f.stroke_id = k.id where k.clip_id = c.id)
         and c.view = 'side-underwater' limit 1`,
    )
    .get();
  if (!model) throw new Error('The demo has no measured clip to copy.');
  const strokes = db.prepare('select * from strokes where clip_id = ?').all(model.id);
  const figures = db
    .prepare('select * from stroke_figures where stroke_id in (select id from strokes where clip_id = ?)')
    .all(model.id);
  const { squad_id: squadId, club_id: clubId, ...clip } = model;
  const insert = (table, row) =>
    db
      .prepare(
        `insert into ${table} (${Object.keys(row).join(', ')}) values (${Object.keys(row)
          .map(() => '?')
          .join(', ')})`,
      )
      .run(...Object.values(row));
  const now = new Date().toISOString();
  let someone = '';
  db.transaction(() => {
    for (let a = 0; a < athleteCount; a++) {
      const athleteId = (someone = randomUUID());
      insert('athletes', {
        id: athleteId,
        club_id: clubId,
        squad_id: squadId,
        name: `Lane ${a}`,
        created_at: now,
      });
      for (let s = 0; s < sessionsEach; s++) {
        const sessionId = randomUUID();
        const date = new Date(Date.UTC(2020, 0, 1 + s * 9)).toISOString().slice(0, 10);
        insert('sessions', { id: sessionId, athlete_id: athleteId, date, created_at: now });
        const clipId = randomUUID();
        insert('clips', { ...clip, id: clipId, session_id: sessionId, sha256: randomUUID() });
        const renamed = new Map(strokes.map(({ id }) => [id, randomUUID()]));
        for (const stroke of strokes)
          insert('strokes', { ...stroke, id: renamed.get(stroke.id), clip_id: clipId });
        for (const figure of figures) {
          const drift = 1 - s / (sessionsEach * 5);
          insert('stroke_figures', {
            ...figure,
            stroke_id: renamed.get(figure.stroke_id),
            value: figure.value * drift,
          });
        }
      }
    }
  })();
  db.close();
  return { athleteId: someone, sessions: athleteCount * sessionsEach };
}
