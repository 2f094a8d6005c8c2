import type { Endpoint } from '@stillstroke/contract/endpoint';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { TestBrowser } from './test-browser';
import { openTestClub, type TestClub, type Who } from './test-club';

type Body = Record<string, unknown>;

export interface Attack {
  readonly path: (club: TestClub) => string;
  /** Somebody who may make this call. */
  readonly by: Who;
  /** A body that would be accepted from them. */
  readonly good?: (club: TestClub) => Body;
  /** Who else tries, and the status they get. */
  readonly refused: Partial<Record<Who, number>>;
  /** Fields that take null. */
  readonly nullable?: readonly string[];
}

/**
 * Attacks a call that needs a sign-in, and checks after each attack that the database is untouched: nobody signed in,
 * other roles and clubs, no CSRF token, a body of another kind, and every field of a good body in turn left with another
 * type, too long, NaN or infinite, plus unknown keys, ids that are none and unknown query keys.
 *
 * ```ts
 * attack(calls.updateSquad, {
 *   path: (club) => `/api/squads/${club.ids.squads.dawn}`,
 *   by: 'admin',
 *   good: () => ({ name: 'Noon squad' }),
 *   refused: { coach: 403, foreignAdmin: 404 },
 * });
 * ```
 */
export function attack(endpoint: Endpoint, plan: Attack): void {
  describe(`attacks on ${endpoint.method} ${endpoint.path}`, () => {
    let club: TestClub;
    const browsers = new Map<Who, TestBrowser>();
    beforeAll(async () => {
      club = await openTestClub();
      for (const who of [plan.by, ...Object.keys(plan.refused)] as Who[]) {
        browsers.set(who, await club.agentFor(who));
      }
      // What a plan places in the club when first asked is there before anything is counted.
      plan.path(club);
      plan.good?.(club);
    });
    afterAll(() => club.close());

    const unharmed = async (work: () => PromiseLike<{ status: number; text: string }>, status: number) => {
      const changes = () => club.context.sqlite.prepare('select total_changes() as n').get();
      const before = changes();
      const answer = await work();
      expect(answer.status, answer.text).toBe(status);
      expect(changes(), 'something was written').toEqual(before);
    };
    const { method } = endpoint;
    const call = (who: Who, path = plan.path(club)) => {
      const browser = browsers.get(who);
      if (!browser) throw new Error(`${who} is not signed in`);
      return browser.bare(method, path);
    };
    const body = () => plan.good?.(club);

    it('is refused without a sign-in', async () => {
      const stranger = club.anonymous();
      await stranger.get('/api/health');
      await unharmed(() => stranger.bare(method, plan.path(club)).send(body()), 401);
      await unharmed(() => club.anonymous().mutateWithoutToken('post', plan.path(club)).send(body()), 401);
    });

    it.each(Object.entries(plan.refused))('is refused to %s with %i', async (who, status) => {
      await unharmed(() => call(who as Who).send(body()), status);
    });

    if (method !== 'get') {
      it('is refused without the CSRF token', async () => {
        const browser = await club.agentFor(plan.by);
        await unharmed(() => browser.mutateWithoutToken(method, plan.path(club)).send(body()), 403);
      });
    }
    if (endpoint.params) {
      it('knows no id that is none', async () => {
        for (const id of ['1', 'null', '..%2f..', "'%20or%20'1'='1", '%00', 'x'.repeat(3000)]) {
          const path = endpoint.path.replace(/:\w+/, id);
          await unharmed(() => call(plan.by, path).send(body()), 404);
        }
      });
    }
    it('takes no unknown query key', async () => {
      const made = call(plan.by, `${plan.path(club)}?unknown=1`);
      await unharmed(() => made.send(body()), 400);
    });

    const { good } = plan;
    if (!good) return;
    it('takes no body of another kind, nor one that is too large', async () => {
      for (const text of ['[]', '"text"', '7', 'null', '{"a":']) {
        const made = call(plan.by).set('Content-Type', 'application/json');
        await unharmed(() => made.send(text), 400);
      }
      const form = call(plan.by).set('Content-Type', 'application/x-www-form-urlencoded');
      await unharmed(() => form.send('a=b'), 415);
      const large = call(plan.by).set('Content-Type', 'application/json');
      await unharmed(() => large.send(JSON.stringify({ ...good(club), more: 'x'.repeat(70_000) })), 413);
    });

    it('takes no unknown key', async () => {
      for (const key of ['unknown', 'id', 'clubId', 'role2', 'constructor']) {
        const made = call(plan.by);
        await unharmed(() => made.send({ ...good(club), [key]: 'x' }), 400);
      }
      const made = call(plan.by).set('Content-Type', 'application/json');
      const text = JSON.stringify(good(club)).replace(/^\{/, '{"__proto__":{"role":"admin"},');
      await unharmed(() => made.send(text), 400);
    });

    it('takes no field of another type, too long, NaN or infinite', async () => {
      for (const key of Object.keys(good(club))) {
        for (const wrong of wrongFor(good(club)[key], plan.nullable?.includes(key) ?? false)) {
          const made = call(plan.by).set('Content-Type', 'application/json');
          const text = JSON.stringify({ ...good(club), [key]: '@' }).replace('"@"', wrong);
          await unharmed(() => made.send(text), 400);
        }
      }
    });
  });
}

/** JSON texts of values that cannot be right where this value is. */
function wrongFor(value: unknown, nullable: boolean): string[] {
  const nothing = nullable ? [] : ['null'];
  if (typeof value === 'string') {
    return [...nothing, '7', 'true', '[]', '{}', '1e999', JSON.stringify('x'.repeat(5000))];
  }
  if (typeof value === 'number') return [...nothing, '"7"', 'true', '[7]', '{}', '1e999', '-1e999', '"NaN"'];
  if (typeof value === 'boolean') return [...nothing, '"true"', '1', '[]', '{}'];
  if (Array.isArray(value)) return [...nothing, '"x"', '7', '{}', '[null]', '[7]', '[{}]', '["x"]'];
  return [...nothing, '"x"', '7', '[]', '{"unknown":1}', '{}'];
}
