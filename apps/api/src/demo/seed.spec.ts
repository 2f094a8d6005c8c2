import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { clipSchema } from '@stillstroke/contract/clip-facts';
import { migrateDatabase } from '@stillstroke/db/migrate';
import { openDatabase } from '@stillstroke/db/open';
import { athletes, clubs, users } from '@stillstroke/db/schema/club';
import { clips, marks, sessions, strokes } from '@stillstroke/db/schema/film';
import { eq } from 'drizzle-orm';
import { pino } from 'pino';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { passwordMatches } from '../auth/passwords';
import { clipAnswer } from '../clips/clip-answer';
import { sweepFilms } from '../media/sweep';
import { filmsOnDisk } from '../media/test-films';
import type { AppContext } from '../platform/context';
import { readSettings } from '../platform/settings';
import { DEMO_CLUBS, DEMO_PASSWORD, type DemoClub } from './season';
import { seedDemo } from './seed';

/** The demo with one film, so that a test need not recognise them all. */
const season: DemoClub[] = DEMO_CLUBS.map((club) => ({
  ...club,
  athletes: club.athletes.map((athlete) => ({
    ...athlete,
    sessions: athlete.sessions.map((session) => ({
      ...session,
      clips: session.clips.filter(({ film }) => film === 'ines-november'),
    })),
  })),
}));

describe('the demo', () => {
  let context: AppContext;
  let close: () => void;

  beforeEach(() => {
    const dataFolder = mkdtempSync(join(tmpdir(), 'stillstroke-seed-'));
    const opened = openDatabase(join(dataFolder, 'stillstroke.db'));
    migrateDatabase(opened, join(import.meta.dirname, '../../../../libs/db/migrations'));
    const settings = readSettings({ STILLSTROKE_DATA: dataFolder });
    context = { settings, ...opened, log: pino({ level: 'silent' }), now: () => new Date() };
    close = () => {
      opened.close();
      rmSync(dataFolder, { recursive: true, force: true });
    };
  });
  afterEach(() => close());

  it('fills an empty database once, with accounts that sign in and clips with films', async () => {
    expect(await seedDemo(context, { season })).toBe(true);
    const { db } = context;
    const coach = db.select().from(users).where(eq(users.email, 'coach@tarnvalley.example')).get();
    expect(await passwordMatches(coach?.passwordHash ?? null, DEMO_PASSWORD)).toBe(true);
    const described = season.flatMap((club) => club.athletes);
    expect(db.select().from(athletes).all()).toHaveLength(described.length);
    const visits = described.flatMap((athlete) => athlete.sessions);
    expect(db.select().from(sessions).all()).toHaveLength(visits.length);
    const kept = db.select({ id: clips.id }).from(clips).all();
    expect(kept).toHaveLength(1);
    const clip = clipSchema.parse(clipAnswer(db, kept[0]?.id ?? ''));
    expect(clip).toMatchObject({ view: 'side-underwater', hasPoster: true, status: 'ready', cutOff: false });
    expect(clip.plumb).not.toBeNull();
    expect(clip.strokeCount).toBeGreaterThan(5);
    expect(await sweepFilms(context)).toEqual({ removed: 0, missing: [] });

    const before = db.select().from(marks).all();
    expect(await seedDemo(context, { season })).toBe(false);
    expect(db.select().from(marks).all()).toEqual(before);
    expect(db.select().from(clubs).all()).toHaveLength(2);
  });

  it('that breaks off in the middle leaves nothing, and the next start begins anew', async () => {
    const last = season.at(-1);
    const broken = last && { ...last, athletes: last.athletes.map((one) => ({ ...one, squad: 'nowhere' })) };
    const half = [...season.slice(0, -1), ...(broken ? [broken] : [])];
    await expect(seedDemo(context, { season: half })).rejects.toThrow('nowhere');
    for (const table of [clubs, users, clips, strokes])
      expect(context.db.select().from(table).all()).toEqual([]);
    // What was moved before the end is swept like after any crash.
    await sweepFilms(context);
    expect(filmsOnDisk(context)).toEqual({ incoming: [], clips: [] });
    expect(await seedDemo(context, { season })).toBe(true);
  });
});
