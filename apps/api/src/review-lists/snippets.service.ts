import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { Snippet, updateSnippet as updateCall } from '@stillstroke/contract/review-lists';
import { snippets } from '@stillstroke/db/schema/review';
import { and, asc, count, eq } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { changedMeanwhile, HttpProblem, notFound } from '../platform/problem';

type Context = Pick<AppContext, 'db' | 'now'>;

const MOST_SNIPPETS = 200;

/** Texts that a coach keeps are their own: nobody else sees them. */
export function listSnippets({ db }: Context, user: SignedInUser): Snippet[] {
  return db
    .select()
    .from(snippets)
    .where(eq(snippets.userId, user.id))
    .orderBy(asc(snippets.createdAt), asc(snippets.id))
    .all()
    .map(answerOf);
}

export function addSnippet({ db, now }: Context, user: SignedInUser, words: string): Snippet {
  const there = db.select({ n: count() }).from(snippets).where(eq(snippets.userId, user.id)).get();
  if ((there?.n ?? 0) >= MOST_SNIPPETS)
    throw new HttpProblem(409, 'conflict', `You keep ${MOST_SNIPPETS} texts; take one away first.`);
  return answerOf(
    db
      .insert(snippets)
      .values({ id: randomUUID(), userId: user.id, words, createdAt: now().toISOString() })
      .returning()
      .get(),
  );
}

export function updateSnippet(
  { db }: Context,
  user: SignedInUser,
  id: string,
  { version, words }: BodyOf<typeof updateCall>,
): Snippet {
  checkVersion(db, user, id, version);
  const changed = db
    .update(snippets)
    .set({ words, version: version + 1 })
    .where(and(eq(snippets.id, id), eq(snippets.version, version)))
    .returning()
    .get();
  if (!changed) throw notFound('text');
  return answerOf(changed);
}

export function deleteSnippet({ db }: Context, user: SignedInUser, id: string, version: number): void {
  checkVersion(db, user, id, version);
  db.delete(snippets)
    .where(and(eq(snippets.id, id), eq(snippets.version, version)))
    .run();
}

function checkVersion(db: AppContext['db'], user: SignedInUser, id: string, version: number): void {
  const there = db
    .select()
    .from(snippets)
    .where(and(eq(snippets.id, id), eq(snippets.userId, user.id)))
    .get();
  if (!there) throw notFound('text');
  if (there.version !== version) throw changedMeanwhile('text', answerOf(there));
}

function answerOf({ id, words, version }: typeof snippets.$inferSelect): Snippet {
  return { id, words, version };
}
