import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import { athletes, clubs, squadCoaches, squads, users } from '@stillstroke/db/schema/club';
import type { AppContext } from '../platform/context';
import type { DemoClub, DemoPerson } from './season';

/** Ids of what was entered of a club, by the demo's keys. */
export interface EnteredClub {
  readonly squadIds: ReadonlyMap<string, string>;
  readonly athleteIds: ReadonlyMap<string, string>;
  /** Who enters the sessions of a squad: its coach. */
  readonly coachOf: ReadonlyMap<string, SignedInUser>;
}

/** Enters a club with its squads, athletes and accounts. */
export function enterClub(
  { db }: Pick<AppContext, 'db'>,
  club: DemoClub,
  passwordHash: string,
  createdAt: string,
): EnteredClub {
  const clubId = randomUUID();
  db.insert(clubs).values({ id: clubId, name: club.name, createdAt }).run();
  const squadIds = new Map(club.squads.map(({ key }) => [key, randomUUID()]));
  const athleteIds = new Map(club.athletes.map(({ key }) => [key, randomUUID()]));
  for (const { key, name } of club.squads)
    db.insert(squads)
      .values({ id: idOf(squadIds, key), clubId, name, createdAt })
      .run();
  for (const { key, name, squad } of club.athletes)
    db.insert(athletes)
      .values({ id: idOf(athleteIds, key), clubId, squadId: idOf(squadIds, squad), name, createdAt })
      .run();
  const coachOf = new Map<string, SignedInUser>();
  for (const person of club.people) {
    const user = enterPerson(person, { clubId, clubName: club.name, athleteIds });
    db.insert(users)
      .values({ ...accountOf(user), passwordHash, createdAt })
      .run();
    for (const squad of person.coaches ?? []) {
      db.insert(squadCoaches)
        .values({ squadId: idOf(squadIds, squad), userId: user.id })
        .run();
      coachOf.set(squad, user);
    }
  }
  return { squadIds, athleteIds, coachOf };
}

function enterPerson(
  { name, email, role, athlete }: DemoPerson,
  {
    clubId,
    clubName,
    athleteIds,
  }: { clubId: string; clubName: string; athleteIds: ReadonlyMap<string, string> },
): SignedInUser {
  const athleteId = athlete === undefined ? null : idOf(athleteIds, athlete);
  return { id: randomUUID(), name, email, role, clubId, clubName, athleteId };
}

function accountOf({ clubName: _, ...account }: SignedInUser) {
  return account;
}

/** @throws Error when the demo's data name something that they do not describe */
export function idOf<T>(entered: ReadonlyMap<string, T>, key: string): T {
  const id = entered.get(key);
  if (id === undefined) throw new Error(`The demo names ${key} but does not describe it.`);
  return id;
}
