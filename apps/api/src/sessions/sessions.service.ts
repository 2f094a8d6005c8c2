import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, QueryOf } from '@stillstroke/contract/endpoint';
import type {
  Session,
  createSession as createCall,
  listSessions as listCall,
  updateSession as updateCall,
} from '@stillstroke/contract/sessions';
import { athletes } from '@stillstroke/db/schema/club';
import { sessions } from '@stillstroke/db/schema/film';
import { and, count, desc, eq, isNull, sql } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { HttpProblem } from '../platform/problem';
import { athleteInReach } from '../reach/reach';
import { undoUntil } from './undo';
import { liveSession, restorableSession } from './live-film';
import { sessionAnswers } from './session-answer';
import { readSessionCursor, sessionCursor } from './session-cursor';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

/** Sessions of an athlete in the caller's reach, newest first. */
export function listSessions(
  { db }: Context,
  user: SignedInUser,
  athleteId: string,
  { cursor, limit }: QueryOf<typeof listCall>,
): { items: Session[]; nextCursor: string | null; total: number } {
  const athlete = athleteInReach(db, user, athleteId);
  const ofAthlete = and(eq(sessions.athleteId, athlete.id), isNull(sessions.deletedAt));
  const after = cursor === undefined ? undefined : readSessionCursor(cursor);
  const rows = db
    .select()
    .from(sessions)
    .where(
      and(
        ofAthlete,
        after &&
          sql`(${sessions.date}, ${sessions.createdAt}, ${sessions.id}) < (${after[0]}, ${after[1]}, ${after[2]})`,
      ),
    )
    .orderBy(desc(sessions.date), desc(sessions.createdAt), desc(sessions.id))
    .limit(limit + 1)
    .all();
  const page = rows.slice(0, limit);
  const last = rows.length > limit ? page.at(-1) : undefined;
  const total = db.select({ n: count() }).from(sessions).where(ofAthlete).get()?.n ?? 0;
  return {
    items: sessionAnswers(
      db,
      page.map((session) => ({ session, athlete })),
    ),
    nextCursor: last ? sessionCursor([last.date, last.createdAt, last.id]) : null,
    total,
  };
}

/** Opens a session for an athlete in the caller's reach; an athlete may do so for themselves. */
export function createSession(
  context: Context,
  user: SignedInUser,
  athleteId: string,
  body: BodyOf<typeof createCall>,
): Session {
  const { db } = context;
  const athlete = athleteInReach(db, user, athleteId);
  if (athlete.deactivatedAt !== null) {
    throw new HttpProblem(409, 'conflict', `${athlete.name} is deactivated; take them back in first.`);
  }
  const session = {
    id: randomUUID(),
    athleteId: athlete.id,
    date: body.date,
    place: body.place || null,
    note: body.note || null,
    createdAt: context.now().toISOString(),
  };
  db.insert(sessions).values(session).run();
  return answerOf(context, session.id);
}

export function getSession(context: Context, user: SignedInUser, sessionId: string): Session {
  return answerOf(context, liveSession(context.db, user, sessionId).session.id);
}

export function updateSession(
  context: Context,
  user: SignedInUser,
  sessionId: string,
  { date, place, note }: BodyOf<typeof updateCall>,
): Session {
  const { db } = context;
  const { session } = liveSession(db, user, sessionId);
  db.update(sessions)
    .set({
      ...(date !== undefined && { date }),
      ...(place !== undefined && { place: place || null }),
      ...(note !== undefined && { note: note || null }),
    })
    .where(eq(sessions.id, session.id))
    .run();
  return answerOf(context, session.id);
}

/** Takes a session with its clips out of sight; until the instant answered it can be brought back. */
export function deleteSession(
  context: Context,
  user: SignedInUser,
  sessionId: string,
): { undoUntil: string } {
  const { db } = context;
  const { session } = liveSession(db, user, sessionId);
  const deletedAt = context.now().toISOString();
  db.update(sessions).set({ deletedAt }).where(eq(sessions.id, session.id)).run();
  return { undoUntil: undoUntil(context.settings, deletedAt) };
}

/** Brings a deleted session back; one that is not deleted stays as it is. */
export function restoreSession(context: Context, user: SignedInUser, sessionId: string): Session {
  const { db } = context;
  const { session } = restorableSession(context, user, sessionId);
  db.update(sessions).set({ deletedAt: null }).where(eq(sessions.id, session.id)).run();
  return answerOf(context, session.id);
}

function answerOf({ db }: Context, sessionId: string): Session {
  const rows = db
    .select({ session: sessions, athlete: athletes })
    .from(sessions)
    .innerJoin(athletes, eq(athletes.id, sessions.athleteId))
    .where(eq(sessions.id, sessionId))
    .all();
  const [answer] = sessionAnswers(db, rows);
  if (!answer) throw new Error('a session that was just found is gone');
  return answer;
}
