import { mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { UploadFields } from '@stillstroke/contract/clips';
import type { Session } from '@stillstroke/contract/sessions';
import { sessions } from '@stillstroke/db/schema/film';
import { randomUUID } from 'node:crypto';
import type { AppContext } from '../platform/context';
import type { TestBrowser } from '../platform/test-browser';
import { keepFilm } from './add-film';
import { clipsFolder, filmPath, openIncoming } from './clip-store';

const corpus = join(import.meta.dirname, '../../../../test/nasty-media');

/** A file of the corpus of nasty media. */
export const corpusFile = (name: string) => join(corpus, name);

export const corpusFiles = (folder = '') =>
  readdirSync(join(corpus, folder))
    .filter((name) => /\.(mp4|mov|mkv|webm|m2t|m4a)$/.test(name))
    .map((name) => join(folder, name));

/** What lies in the data folder's film folders: entries of incoming and clips. */
export function filmsOnDisk({ settings }: Pick<AppContext, 'settings'>): {
  incoming: string[];
  clips: string[];
} {
  const list = (folder: string) => {
    mkdirSync(folder, { recursive: true });
    return readdirSync(folder);
  };
  return { incoming: list(join(settings.dataFolder, 'incoming')), clips: list(clipsFolder(settings)) };
}

/** Opens a session through the API. */
export async function openSession(
  browser: TestBrowser,
  athleteId: string,
  date = '2026-03-02',
): Promise<Session> {
  const answer = await browser.mutate('post', `/api/athletes/${athleteId}/sessions`).send({ date });
  if (answer.status !== 201) throw new Error(`no session: ${answer.status} ${answer.text}`);
  return answer.body as Session;
}

/** Uploads a file of the corpus, or other bytes under a name, through the API. */
export function upload(
  browser: TestBrowser,
  sessionId: string,
  film: string | { bytes: Buffer; name: string },
  fields: Record<string, string> = {},
) {
  const call = browser.mutate('post', `/api/sessions/${sessionId}/clips`);
  for (const [name, value] of Object.entries(fields)) void call.field(name, value);
  return typeof film === 'string'
    ? call.attach('video', corpusFile(film))
    : call.attach('video', film.bytes, film.name);
}

/** Opens a session in the database, for tests that are not about opening one. */
export function placeSession({ db }: AppContext, athleteId: string, date = '2026-03-02'): string {
  const id = randomUUID();
  db.insert(sessions)
    .values({ id, athleteId, date, createdAt: `${date}T18:00:00.000Z` })
    .run();
  return id;
}

/**
 * Keeps a clip as if it had been recognised, for tests that are not about that: 1920 × 1080 at 50 frames a second. The
 * film's bytes are its hash's text.
 */
export function placeClip(
  context: AppContext,
  athleteId: string,
  sessionId: string,
  { frameCount = 200, ...fields }: Partial<UploadFields> & { frameCount?: number } = {},
): Clip {
  const incoming = openIncoming(context.settings);
  const sha256 = randomUUID().replaceAll('-', '').repeat(2);
  writeFileSync(filmPath(incoming), sha256);
  return keepFilm(context, athleteId, sessionId, incoming, {
    name: 'lane-four.mp4',
    fields: { view: 'side-underwater', travel: 'right', stroke: 'full', captureRateFactor: 1, ...fields },
    sizeBytes: sha256.length,
    sha256,
    hasPoster: false,
    index: {
      timestampsUs: Array.from({ length: frameCount }, (_, n) => n * 20_000),
      keyFrames: [0],
      width: 1920,
      height: 1080,
      codedWidth: 1920,
      codedHeight: 1080,
      rotation: 0,
      mirrored: false,
      pixelAspect: 1,
      codec: 'avc',
      container: 'MP4',
      durationUs: frameCount * 20_000,
      frameRate: 50,
      truncated: false,
    },
  });
}
