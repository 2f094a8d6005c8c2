import type { Method } from '@stillstroke/contract/endpoint';
import { expect } from 'vitest';
import { emailOf, everybody, type TestClub, type Who } from '../platform/test-club';

/** A call and who gets what from it. Everybody who is not named gets 404. */
export interface Attack {
  readonly method: Method;
  readonly path: string;
  readonly body?: object;
  /** Statuses of those for whom it exists; of `anonymous`, always 401. */
  readonly answers: Partial<Record<Who, number>>;
}

/** Tries a call without sign-in, without the CSRF token, and as everybody there is. */
export async function tryAsEverybody(club: TestClub, { method, path, body, answers }: Attack): Promise<void> {
  const statuses: Partial<Record<Who | 'anonymous', number>> = {};
  const anonymous = club.anonymous();
  await anonymous.get('/api/auth/page');
  const bare = method === 'get' ? anonymous.get(path) : anonymous.mutate(method, path).send(body ?? {});
  statuses.anonymous = (await bare).status;
  if (method !== 'get') {
    const coach = await club.agentFor('coach');
    const forged = await coach.mutateWithoutToken(method, path).send(body ?? {});
    expect([path, 'without the token', forged.status]).toEqual([path, 'without the token', 403]);
  }
  // Those who may change things come last, so that what they change is still there for the others.
  const order = [...everybody].sort((a, b) =>
    (answers[a] ?? 404) < 300 ? 1 : (answers[b] ?? 404) < 300 ? -1 : 0,
  );
  for (const who of order) {
    const browser = await club.agentFor(who);
    const call = method === 'get' ? browser.get(path) : browser.mutate(method, path).send(body);
    statuses[who] = (await call).status;
  }
  const expected = Object.fromEntries(everybody.map((who) => [who, answers[who] ?? 404]));
  expect({ path, ...statuses }, emailOf('coach')).toEqual({ path, ...expected, anonymous: 401 });
}
