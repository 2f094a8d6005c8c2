import * as calls from '@stillstroke/contract/squads';
import { attack } from '../platform/test-attack';

attack(calls.listSquads, {
  path: () => '/api/squads',
  by: 'coach',
  refused: { athlete: 403, guardian: 403 },
});

attack(calls.createSquad, {
  path: () => '/api/squads',
  by: 'admin',
  good: (club) => ({ name: 'Noon squad', coachIds: [club.ids.users.coach] }),
  refused: { coach: 403, athlete: 403, guardian: 403, foreignAdmin: 400 },
});

attack(calls.updateSquad, {
  path: (club) => `/api/squads/${club.ids.squads.dawn}`,
  by: 'admin',
  good: (club) => ({ name: 'Noon squad', coachIds: [club.ids.users.coach], deactivated: false }),
  refused: { coach: 403, otherCoach: 403, athlete: 403, foreignAdmin: 404, foreignCoach: 403 },
});
