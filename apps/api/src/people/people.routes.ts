import * as calls from '@stillstroke/contract/people';
import type { Request } from 'express';
import { Router } from 'express';
import { invitationUrl } from '../invitations/issue';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { invitePerson, listPeople, reinvitePerson, updatePerson, type Invited } from './people.service';

export function peopleRoutes(context: AppContext): Router {
  const router = Router();
  // Without a public address set, the one that the admin came by.
  const baseOf = (req: Request) =>
    context.settings.publicUrl ?? `${req.protocol}://${req.get('host') ?? 'localhost'}`;
  const withLink = (req: Request, { person, invitation }: Invited) => ({
    person,
    invitation: {
      url: invitationUrl(baseOf(req), invitation.token),
      expiresAt: invitation.expiresAt,
    },
  });
  mount(router, calls.listPeople, ({ user, query }) => listPeople(context, user, query));
  mount(router, calls.invitePerson, ({ user, body, req }) =>
    withLink(req, invitePerson(context, user, body)),
  );
  mount(router, calls.updatePerson, ({ user, params, body }) => updatePerson(context, user, params.id, body));
  mount(router, calls.reinvitePerson, ({ user, params, req }) =>
    withLink(req, reinvitePerson(context, user, params.id)),
  );
  return router;
}
