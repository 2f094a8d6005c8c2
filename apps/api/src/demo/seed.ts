import { clubs } from '@stillstroke/db/schema/club';
import type { SignedInUser } from '@stillstroke/contract/auth';
import { hashPassword } from '../auth/passwords';
import { setCalibration } from '../clips/clips.service';
import { setDistance } from '../clips/distance.service';
import { putMark } from '../marks/marks.service';
import { keepFilm } from '../media/add-film';
import { dropFolder } from '../media/clip-store';
import type { AppContext } from '../platform/context';
import { createSession } from '../sessions/sessions.service';
import { createStroke } from '../strokes/strokes.service';
import { createTarget } from '../targets/targets.service';
import {
  demoMediaFolder,
  layOutClip,
  recogniseDemoFilm,
  type DemoFilm,
  type WaitingClip,
} from './demo-films';
import { enterClub, idOf } from './demo-people';
import type { FilmName, FilmTruth } from './film-truth';
import { marksFromTruth } from './marks-from-truth';
import { DEMO_CLUBS, DEMO_PASSWORD, type DemoClip, type DemoClub, type DemoSession } from './season';

export interface SeedOptions {
  /** Folder of the demo's films. */
  readonly media?: string;
  /** The clubs to enter; the demo's own where nothing is said. */
  readonly season?: readonly DemoClub[];
}

/**
 * Fills an empty database with the demo clubs: accounts, squads, athletes, and a season of sessions with marked clips,
 * through the services that the API uses. Films are laid out first; then everything is entered in one transaction, so
 * that a crash leaves an empty database (and films that the sweep at the next start takes), never half a club.
 *
 * @returns false when the database is not empty; nothing is touched then
 */
export async function seedDemo(context: AppContext, options: SeedOptions = {}): Promise<boolean> {
  const { media = demoMediaFolder(), season = DEMO_CLUBS } = options;
  if (!isEmpty(context)) return false;
  const films = await recogniseAll(context, media, season);
  const waiting = new Map<DemoClip, WaitingClip>();
  try {
    for (const clip of clipsOf(season)) {
      const film = films.get(clip.film);
      if (film) waiting.set(clip, await layOutClip(context, film, clip));
    }
    const passwordHash = await hashPassword(DEMO_PASSWORD);
    const enter = context.sqlite.transaction((): boolean => {
      // Somebody else may have filled it meanwhile.
      if (!isEmpty(context)) return false;
      for (const club of season) enterSeason(context, club, passwordHash, waiting);
      return true;
    });
    return enter.immediate();
  } finally {
    for (const { incoming } of waiting.values()) await dropFolder(incoming);
  }
}

const isEmpty = ({ db }: AppContext) => db.select({ id: clubs.id }).from(clubs).limit(1).get() === undefined;

function clipsOf(season: readonly DemoClub[]): DemoClip[] {
  return season
    .flatMap(({ athletes }) => athletes)
    .flatMap(({ sessions }) => sessions)
    .flatMap(({ clips }) => clips);
}

async function recogniseAll(
  context: AppContext,
  media: string,
  season: readonly DemoClub[],
): Promise<Map<FilmName, DemoFilm>> {
  const names = [...new Set(clipsOf(season).map(({ film }) => film))];
  const films = new Map<FilmName, DemoFilm>();
  await Promise.all(
    names.map(async (name) => {
      const film = await recogniseDemoFilm(context, media, name);
      if (film) films.set(name, film);
      else context.log.warn({ film: name }, 'a film of the demo is missing; its clips are left out');
    }),
  );
  return films;
}

function enterSeason(
  context: AppContext,
  club: DemoClub,
  passwordHash: string,
  waiting: ReadonlyMap<DemoClip, WaitingClip>,
): void {
  const dates = club.athletes.flatMap(({ sessions }) => sessions.map(({ date }) => date)).sort();
  const opened = new Date(`${dates[0] ?? '2026-01-01'}T06:00:00.000Z`).toISOString();
  const { athleteIds, coachOf } = enterClub(context, club, passwordHash, opened);
  for (const athlete of club.athletes) {
    for (const session of athlete.sessions) {
      const coach = idOf(coachOf, athlete.squad);
      enterSession(context, coach, idOf(athleteIds, athlete.key), session, waiting);
    }
    const last = clockFrom(`${athlete.sessions.at(-1)?.date ?? opened.slice(0, 10)}T20:00:00.000Z`);
    for (const target of athlete.targets ?? []) {
      const coach = idOf(coachOf, athlete.squad);
      createTarget({ ...context, now: last }, coach, idOf(athleteIds, athlete.key), target);
    }
  }
}

function enterSession(
  context: AppContext,
  coach: SignedInUser,
  athleteId: string,
  { date, place, note, clips }: DemoSession,
  waiting: ReadonlyMap<DemoClip, WaitingClip>,
): void {
  const evening = clockFrom(`${date}T18:30:00.000Z`);
  const then = { ...context, now: evening };
  const session = createSession(then, coach, athleteId, { date, place, ...(note !== null && { note }) });
  for (const clip of clips) {
    const laidOut = waiting.get(clip);
    if (!laidOut) continue;
    const { id } = keepFilm(then, athleteId, session.id, laidOut.incoming, laidOut.film);
    if (clip.marking) enterMarking(then, coach, id, marksFromTruth(laidOut.truth, clip.marking));
    if (clip.bandAtS !== undefined) enterBands(then, coach, id, laidOut.truth, clip.bandAtS);
  }
}

/** Marks before strokes: what a stroke measures is then computed once, not anew with every mark. */
function enterMarking(
  context: AppContext,
  coach: SignedInUser,
  clipId: string,
  { plumb, marks, strokes }: ReturnType<typeof marksFromTruth>,
): void {
  setCalibration(context, coach, clipId, { plumb });
  for (const { arm, frame, ...joints } of marks) putMark(context, coach, { id: clipId, arm, frame }, joints);
  for (const stroke of strokes) createStroke(context, coach, clipId, stroke);
}

/** The rendered pool has a dark band every 5 m, and its swimmers swim at one speed. */
const BANDS_M = 5;
const BANDS_UNCERTAINTY_M = 0.05;
export const DEMO_SWIM_SPEED = 1.42;

function enterBands(
  context: AppContext,
  coach: SignedInUser,
  clipId: string,
  { framesPerSecond }: FilmTruth,
  bandAtS: number,
): void {
  const [fromFrame, toFrame] = [bandAtS, bandAtS + BANDS_M / DEMO_SWIM_SPEED].map((s) =>
    Math.round(s * framesPerSecond),
  );
  if (fromFrame === undefined || toFrame === undefined) return;
  const distance = { metres: BANDS_M, uncertaintyM: BANDS_UNCERTAINTY_M, fromFrame, toFrame };
  setDistance(context, coach, clipId, { distance });
}

/** A clock that starts at an instant and moves on a second with every look, so that what comes later is later. */
function clockFrom(instant: string): () => Date {
  let ms = Date.parse(instant);
  return () => new Date((ms += 1000));
}
