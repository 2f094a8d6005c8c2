import { fork } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import autocannon from 'autocannon';
import Database from 'better-sqlite3';
import { addLargeClub } from './large-club.mjs';
import { signIn, startProduct } from './product.mjs';

const ports = { product: 4395, bare: 4396 };
const seconds = Number(process.env.BENCH_SECONDS ?? 15);
const perSecond = 200;

/** API under 200 requests a second of mixed reads and marks, then a club of 10,000 sessions, each beside its reference. */
export async function benchApi() {
  const dataFolder = mkdtempSync(join(tmpdir(), 'stillstroke-bench-'));
  try {
    const bare = await loadBare();
    const mixed = await loadMixed(dataFolder);
    report(bare, mixed);
    await timeLargeClub(dataFolder);
  } finally {
    rmSync(dataFolder, { recursive: true, force: true });
  }
}

async function loadBare() {
  const child = fork(fileURLToPath(new URL('./bare-express.mjs', import.meta.url)), [String(ports.bare)]);
  await once(child, 'message');
  const result = await load(`http://127.0.0.1:${ports.bare}`, [{ method: 'GET', path: '/bare' }], {});
  child.kill();
  return result;
}

async function loadMixed(dataFolder) {
  const product = await startProduct({ dataFolder, port: ports.product });
  const headers = await signIn(product.base, 'coach@tarnvalley.example', 'stillwater-demo');
  const result = await load(product.base, await mixedRequests(product.base, headers), headers);
  await product.stop();
  return result;
}

/** One round: seven reads that pages make, three marks as they are dragged. */
async function mixedRequests(base, headers) {
  const get = async (path) => (await fetch(`${base}${path}`, { headers })).json();
  const athletes = await get('/api/athletes');
  const sessions = await Promise.all(athletes.items.map(({ id }) => get(`/api/athletes/${id}/sessions`)));
  const clips = sessions.flatMap(({ items }) => items).flatMap((session) => session.clips);
  const clip = clips.find(({ markedFrames }) => markedFrames > 0);
  const { items: marks } = await get(`/api/clips/${clip.id}/marks`);
  const { arm, frame, shoulder, elbow, wrist } = marks[0];
  // Each one differs from the one before: a mark sent again as it is would be answered without writing.
  const mark = (shift) => ({
    method: 'PUT',
    path: `/api/clips/${clip.id}/marks/${arm}/${frame}`,
    body: JSON.stringify({ shoulder, elbow, wrist: { ...wrist, x: wrist.x + shift } }),
  });
  const reads = [
    '/api/athletes',
    `/api/athletes/${clip.athleteId}/sessions`,
    `/api/athletes/${clip.athleteId}/trend`,
    `/api/sessions/${clip.sessionId}/comparison`,
    `/api/clips/${clip.id}/marks`,
    `/api/clips/${clip.id}/strokes`,
    `/api/clips/${clip.id}/measures`,
  ].map((path) => ({ method: 'GET', path }));
  return [...reads.slice(0, 3), mark(0), ...reads.slice(3, 5), mark(0.25), ...reads.slice(5), mark(0.5)];
}

async function load(url, requests, headers) {
  const result = await autocannon({
    url,
    requests,
    headers,
    connections: 10,
    overallRate: perSecond,
    duration: seconds,
  });
  const failed = result.non2xx + result.errors + result.timeouts;
  if (failed > 0) console.log(`  ${failed} of ${result.requests.total} requests failed`);
  return result;
}

function report(bare, mixed) {
  console.log(`\nAPI, ${perSecond} requests a second for ${seconds} s, ms`);
  const row = (name, { latency, requests }) => ({
    name,
    requests: requests.total,
    'a second': Math.round(requests.average),
    median: latency.p50,
    p99: latency.p99,
    most: latency.max,
  });
  console.table([row('bare Express route', bare), row('mixed reads and marks', mixed)]);
  console.log(
    `p99 against the bare route: ${(mixed.latency.p99 / Math.max(1, bare.latency.p99)).toFixed(1)}×`,
  );
}

async function timeLargeClub(dataFolder) {
  const { athleteId, sessions } = addLargeClub(dataFolder);
  const bare = timeBareQuery(dataFolder, athleteId);
  const product = await startProduct({ dataFolder, port: ports.product });
  const headers = await signIn(product.base, 'coach@tarnvalley.example', 'stillwater-demo');
  const rows = [];
  const listed = await fetch(`${product.base}/api/athletes/${athleteId}/sessions?limit=1`, { headers });
  const sessionId = (await listed.json()).items[0].id;
  for (const path of [
    '/api/athletes?limit=50',
    '/api/athletes?limit=50&sort=lastSession&direction=desc',
    `/api/athletes/${athleteId}/sessions`,
    `/api/athletes/${athleteId}/trend?measure=verticalAt`,
    `/api/sessions/${sessionId}/comparison`,
  ]) {
    const times = await timeRequests(`${product.base}${path}`, headers);
    rows.push({
      path: path.replace(athleteId, ':id').replace(sessionId, ':id'),
      ...times,
      'ratio to the bare query': Number((times.median / bare).toFixed(1)),
    });
  }
  await product.stop();
  console.log(
    `\nA club of ${sessions} sessions, 200 of them one athlete's, ms (bare query of one athlete's figures: ${bare.toFixed(2)} ms)`,
  );
  console.table(rows);
}

/** The figures of one measure of one athlete straight from SQLite, median of 50. */
function timeBareQuery(dataFolder, athleteId) {
  const db = new Database(join(dataFolder, 'stillstroke.sqlite'), { readonly: true });
  const query = db.prepare(
    `select s.date, k.arm, f.value, f.uncertainty from sessions s join clips c on c.session_id = s.id
     join strokes k on k.clip_id = c.id join stroke_figures f on f.stroke_id = k.id
     where s.athlete_id = ? and f.measure = 'verticalAt'`,
  );
  const times = Array.from({ length: 50 }, () => {
    const begun = performance.now();
    query.all(athleteId);
    return performance.now() - begun;
  });
  db.close();
  return quantile(times, 0.5);
}

async function timeRequests(url, headers) {
  const times = [];
  for (let at = 0; at < 60; at++) {
    const begun = performance.now();
    const answer = await fetch(url, { headers });
    await answer.arrayBuffer();
    if (!answer.ok) throw new Error(`${url} answered ${answer.status}`);
    if (at >= 10) times.push(performance.now() - begun);
  }
  const round = (value) => Number(value.toFixed(1));
  return { median: round(quantile(times, 0.5)), p95: round(quantile(times, 0.95)) };
}

function quantile(values, share) {
  return [...values].sort((a, b) => a - b)[Math.min(values.length - 1, Math.floor(share * values.length))];
}
