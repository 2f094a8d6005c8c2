import * as calls from '@stillstroke/contract/people';
import { attack } from '../platform/test-attack';

const others = { coach: 403, athlete: 403, guardian: 403, foreignCoach: 403 };

attack(calls.listPeople, { path: () => '/api/people', by: 'admin', refused: others });

attack(calls.invitePerson, {
  path: () => '/api/people',
  by: 'admin',
  good: (club) => ({
    name: 'Mara Holt',
    email: 'mara@tarn.example',
    role: 'coach',
    squadIds: [club.ids.squads.dawn],
  }),
  refused: { ...others, foreignAdmin: 400 },
});

attack(calls.updatePerson, {
  path: (club) => `/api/people/${club.ids.users.coach}`,
  by: 'admin',
  good: (club) => ({ name: 'Mara Holt', squadIds: [club.ids.squads.dawn], deactivated: false }),
  refused: { ...others, foreignAdmin: 404 },
});

attack(calls.reinvitePerson, {
  path: (club) => `/api/people/${club.ids.users.coach}/invitation`,
  by: 'admin',
  refused: { ...others, foreignAdmin: 404 },
});
