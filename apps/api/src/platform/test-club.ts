import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Role } from '@stillstroke/contract/roles';
import { migrateDatabase } from '@stillstroke/db/migrate';
import { openDatabase } from '@stillstroke/db/open';
import { athletes, clubs, squadCoaches, squads, users } from '@stillstroke/db/schema/club';
import type { Express } from 'express';
import { pino } from 'pino';
import { createApp, type AppOptions } from '../app';
import { hashPassword } from '../auth/passwords';
import type { AppContext } from './context';
import { readSettings, type Settings } from './settings';
import { TestBrowser } from './test-browser';

/** Everybody's password in the test club. */
export const testPassword = 'lane four at dawn';

const migrationsFolder = join(import.meta.dirname, '../../../../libs/db/migrations');

/** Who is who: `coach` coaches the squad of `athlete` and `otherAthlete`; the `foreign…` are of Northmere. */
const accounts = {
  admin: { role: 'admin', club: 'tarnValley' },
  coach: { role: 'coach', club: 'tarnValley' },
  otherCoach: { role: 'coach', club: 'tarnValley' },
  athlete: { role: 'athlete', club: 'tarnValley' },
  otherAthlete: { role: 'athlete', club: 'tarnValley' },
  guardian: { role: 'guardian', club: 'tarnValley' },
  foreignAdmin: { role: 'admin', club: 'northmere' },
  foreignCoach: { role: 'coach', club: 'northmere' },
  foreignAthlete: { role: 'athlete', club: 'northmere' },
} as const satisfies Record<string, { role: Role; club: ClubName }>;

type ClubName = 'tarnValley' | 'northmere';
export type Who = keyof typeof accounts;
export const everybody = Object.keys(accounts) as Who[];

/** Ids of what is in the two clubs when a test begins. */
export interface ClubIds {
  readonly clubs: Record<ClubName, string>;
  /** `dawn`: coached by `coach`; `dusk`: by `otherCoach`; `harbour`: Northmere's. */
  readonly squads: Record<'dawn' | 'dusk' | 'harbour', string>;
  /** `own` and `other` swim in dawn and have accounts; `dusk` in dusk, without one; `foreign` in harbour. */
  readonly athletes: Record<'own' | 'other' | 'dusk' | 'foreign', string>;
  readonly users: Record<Who, string>;
}

export interface TestClub {
  readonly app: Express;
  readonly context: AppContext;
  readonly ids: ClubIds;
  /** Sets the clock that the server goes by. */
  setNow(now: Date): void;
  /** A browser in which this person is signed in (the same one each time). */
  agentFor(who: Who): Promise<TestBrowser>;
  /** A browser in which nobody is signed in. */
  anonymous(): TestBrowser;
  close(): void;
}

export const emailOf = (who: Who) =>
  `${who.toLowerCase()}@${accounts[who].club === 'tarnValley' ? 'tarn' : 'north'}.example`;

/**
 * A server over an empty data folder and an in-memory database with the real migrations, with two clubs in it. Close it
 * when the test is done.
 */
export async function openTestClub(
  options: AppOptions & { readonly settings?: Partial<Settings> } = {},
): Promise<TestClub> {
  const dataFolder = mkdtempSync(join(tmpdir(), 'stillstroke-test-'));
  const opened = openDatabase(':memory:');
  migrateDatabase(opened, migrationsFolder);
  let now: Date | null = null;
  const context: AppContext = {
    settings: {
      ...readSettings({ STILLSTROKE_DATA: dataFolder, STILLSTROKE_LOG: 'silent' }),
      ...options.settings,
    },
    db: opened.db,
    sqlite: opened.sqlite,
    log: pino({ level: 'silent' }),
    now: () => now ?? new Date(),
  };
  const ids = fillClubs(context, await passwordHash());
  const app = createApp(context, options);
  const signedIn = new Map<Who, Promise<TestBrowser>>();
  return {
    app,
    context,
    ids,
    setNow: (instant) => (now = instant),
    anonymous: () => new TestBrowser(app),
    agentFor: (who) => {
      const kept = signedIn.get(who) ?? TestBrowser.signedIn(app, emailOf(who), testPassword);
      signedIn.set(who, kept);
      return kept;
    },
    close: () => {
      opened.close();
      rmSync(dataFolder, { recursive: true, force: true });
    },
  };
}

let hashed: Promise<string> | undefined;
/** One hash for everybody: making it is slow on purpose. */
function passwordHash(): Promise<string> {
  hashed ??= hashPassword(testPassword);
  return hashed;
}

function fillClubs({ db }: AppContext, hash: string): ClubIds {
  const createdAt = '2026-01-05T06:00:00.000Z';
  const id = () => randomUUID();
  const club = { tarnValley: id(), northmere: id() };
  const squad = { dawn: id(), dusk: id(), harbour: id() };
  const athlete = { own: id(), other: id(), dusk: id(), foreign: id() };
  const user = Object.fromEntries(everybody.map((who) => [who, id()])) as Record<Who, string>;
  const { tarnValley, northmere } = club;
  db.insert(clubs)
    .values([
      { id: tarnValley, name: 'Tarn Valley Swim Club', createdAt },
      { id: northmere, name: 'Northmere Swim Club', createdAt },
    ])
    .run();
  db.insert(squads)
    .values([
      { id: squad.dawn, clubId: tarnValley, name: 'Dawn squad', createdAt },
      { id: squad.dusk, clubId: tarnValley, name: 'Dusk squad', createdAt },
      { id: squad.harbour, clubId: northmere, name: 'Harbour squad', createdAt },
    ])
    .run();
  db.insert(athletes)
    .values([
      { id: athlete.own, clubId: tarnValley, squadId: squad.dawn, name: 'Ebba Lindqvist', createdAt },
      { id: athlete.other, clubId: tarnValley, squadId: squad.dawn, name: 'Otis Farrow', createdAt },
      { id: athlete.dusk, clubId: tarnValley, squadId: squad.dusk, name: 'Nuri Halloran', createdAt },
      { id: athlete.foreign, clubId: northmere, squadId: squad.harbour, name: 'Wren Calloway', createdAt },
    ])
    .run();
  const athleteOf: Partial<Record<Who, string>> = {
    athlete: athlete.own,
    otherAthlete: athlete.other,
    foreignAthlete: athlete.foreign,
  };
  db.insert(users)
    .values(
      everybody.map((who) => ({
        id: user[who],
        clubId: club[accounts[who].club],
        name: `The ${who}`,
        email: emailOf(who),
        role: accounts[who].role,
        passwordHash: hash,
        athleteId: athleteOf[who] ?? null,
        createdAt,
      })),
    )
    .run();
  db.insert(squadCoaches)
    .values([
      { squadId: squad.dawn, userId: user.coach },
      { squadId: squad.dusk, userId: user.otherCoach },
      { squadId: squad.harbour, userId: user.foreignCoach },
    ])
    .run();
  return { clubs: club, squads: squad, athletes: athlete, users: user };
}
