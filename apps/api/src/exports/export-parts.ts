import type { SignedInUser } from '@stillstroke/contract/auth';
import {
  EXPORT_FORMAT,
  EXPORT_VERSION,
  type ExportFile,
  type ExportScope,
  type ExportSession,
  type ExportTrend,
} from '@stillstroke/contract/export';
import { sessions } from '@stillstroke/db/schema/film';
import { and, asc, eq, isNull } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { athleteInReach } from '../reach/reach';
import { liveClip, liveSession } from '../sessions/live-film';
import { exportedSession, exportedTrend } from './export-session';

export type ExportHead = Pick<ExportFile, 'format' | 'exportedAt' | 'scope' | 'athlete'>;

/** An export in pieces that are read one after the other, so that a season never lies in memory at once. */
export interface ExportParts {
  readonly head: ExportHead;
  /** Without ending, in ASCII. */
  readonly fileName: string;
  readonly sessions: Iterable<ExportSession>;
  readonly trend: () => ExportTrend[];
}

type Context = Pick<AppContext, 'db' | 'now'>;

/** Finds what is asked for, or 404, before anything is sent. */
export function exportParts(
  context: Context,
  user: SignedInUser,
  kind: ExportScope,
  id: string,
): ExportParts {
  const { athlete, dates, sessionIds, clipId } = scopeOf(context, user, kind, id);
  return {
    head: {
      format: { name: EXPORT_FORMAT, version: EXPORT_VERSION },
      exportedAt: context.now().toISOString(),
      scope: { kind, id },
      athlete: { id: athlete.id, name: athlete.name },
    },
    fileName: ['stillstroke', plainName(athlete.name), ...dates, ...(clipId ? ['clip'] : [])].join('-'),
    sessions: each(sessionIds, (sessionId) => exportedSession(context, user, sessionId, clipId)),
    trend: () => (kind === 'athlete' ? exportedTrend(context, user, athlete.id) : []),
  };
}

/** The same in one piece, for what is small enough. */
export function wholeExport(parts: ExportParts): ExportFile {
  return { ...parts.head, sessions: [...parts.sessions], trend: parts.trend() };
}

function scopeOf({ db }: Context, user: SignedInUser, kind: ExportScope, id: string) {
  if (kind === 'athlete') {
    const athlete = athleteInReach(db, user, id);
    const found = db
      .select({ id: sessions.id })
      .from(sessions)
      .where(and(eq(sessions.athleteId, athlete.id), isNull(sessions.deletedAt)))
      .orderBy(asc(sessions.date), asc(sessions.createdAt), asc(sessions.id))
      .all();
    return { athlete, dates: [], sessionIds: found.map((row) => row.id), clipId: undefined };
  }
  const { athlete, session } = kind === 'clip' ? liveClip(db, user, id) : liveSession(db, user, id);
  return {
    athlete,
    dates: [session.date],
    sessionIds: [session.id],
    clipId: kind === 'clip' ? id : undefined,
  };
}

function* each<T, R>(items: readonly T[], read: (item: T) => R): Generator<R> {
  for (const item of items) yield read(item);
}

/** Letters and digits of a name, for a file name that every system takes. */
export function plainName(name: string): string {
  const plain = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
  return plain || 'athlete';
}
