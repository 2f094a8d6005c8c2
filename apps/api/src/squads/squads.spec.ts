import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Squad } from '@stillstroke/contract/squads';
import { openTestClub, type TestClub } from '../platform/test-club';

let club: TestClub;
beforeEach(async () => {
  club = await openTestClub();
});
afterEach(() => club.close());

const squadsOf = async (who: 'admin' | 'coach' | 'foreignAdmin') =>
  ((await (await club.agentFor(who)).get('/api/squads')).body as { items: Squad[] }).items;

describe('squads', () => {
  it('are listed to an admin for the club, to a coach where they coach', async () => {
    expect((await squadsOf('admin')).map((squad) => squad.name)).toEqual(['Dawn squad', 'Dusk squad']);
    expect(await squadsOf('coach')).toEqual([
      {
        id: club.ids.squads.dawn,
        name: 'Dawn squad',
        coaches: [{ id: club.ids.users.coach, name: 'The coach' }],
        athleteCount: 2,
        deactivated: false,
      },
    ]);
    expect((await squadsOf('foreignAdmin')).map((squad) => squad.name)).toEqual(['Harbour squad']);
  });

  it('get coaches, and with them the coaches get reach', async () => {
    const admin = await club.agentFor('admin');
    const path = `/api/squads/${club.ids.squads.dawn}`;
    const otherCoach = await club.agentFor('otherCoach');
    await otherCoach.get(`/api/athletes/${club.ids.athletes.own}`).expect(404);
    const changed = await admin.mutate('patch', path).send({ coachIds: [club.ids.users.otherCoach] });
    expect((changed.body as Squad).coaches.map((coach) => coach.name)).toEqual(['The otherCoach']);
    await otherCoach.get(`/api/athletes/${club.ids.athletes.own}`).expect(200);
    await (await club.agentFor('coach')).get(`/api/athletes/${club.ids.athletes.own}`).expect(404);
  });

  it('take no coach of another club, nor somebody who is no coach, nor half of a change', async () => {
    const admin = await club.agentFor('admin');
    const { users } = club.ids;
    for (const stranger of [users.foreignCoach, users.athlete]) {
      const answer = await admin
        .mutate('patch', `/api/squads/${club.ids.squads.dawn}`)
        .send({ name: 'Renamed', coachIds: [users.coach, stranger] });
      expect(answer.body).toMatchObject({ status: 400, issues: [{ path: 'coachIds.1' }] });
    }
    expect((await squadsOf('admin'))[0]).toMatchObject({
      name: 'Dawn squad',
      coaches: [{ id: users.coach }],
    });
  });

  it('have names that are unique in a club, whatever the case', async () => {
    const answer = await (
      await club.agentFor('admin')
    )
      .mutate('post', '/api/squads')
      .send({ name: 'DAWN squad' });
    expect(answer.body).toMatchObject({ status: 409, code: 'name-taken' });
    await (
      await club.agentFor('foreignAdmin')
    )
      .mutate('post', '/api/squads')
      .send({ name: 'Dawn squad' })
      .expect(201);
  });

  it('are deactivated only when nobody swims in them, and taken back in', async () => {
    const admin = await club.agentFor('admin');
    const path = `/api/squads/${club.ids.squads.dusk}`;
    const refused = await admin.mutate('patch', path).send({ deactivated: true });
    expect(refused.body).toMatchObject({ status: 409, code: 'conflict' });
    await admin
      .mutate('patch', `/api/athletes/${club.ids.athletes.dusk}`)
      .send({ deactivated: true })
      .expect(200);
    const gone = await admin.mutate('patch', path).send({ deactivated: true });
    expect(gone.body).toMatchObject({ deactivated: true, athleteCount: 0 });
    expect((await admin.mutate('patch', path).send({ deactivated: false })).body).toMatchObject({
      deactivated: false,
    });
  });
});
