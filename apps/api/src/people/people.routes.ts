import * as calls from '@stillstroke/contract/people';
import { Router } from 'express';
import { invitationUrl } from '../invitations/issue';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { invitePerson, listPeople, reinvitePerson, updatePerson, type Invited } from './people.service';

export function peopleRoutes(context: AppContext): Router {
  const router = Router();
  const { publicUrl, mail } = context.settings;
  const withLink = ({ person, invitation }: Invited) => ({
    person,
    invitation: {
      url: invitationUrl(publicUrl, invitation.token),
      expiresAt: invitation.expiresAt,
      mailed: mail.server !== null,
    },
  });
  mount(router, calls.listPeople, ({ user, query }) => listPeople(context, user, query));
  mount(router, calls.invitePerson, ({ user, body }) => withLink(invitePerson(context, user, body)));
  mount(router, calls.updatePerson, ({ user, params, body }) => updatePerson(context, user, params.id, body));
  mount(router, calls.reinvitePerson, ({ user, params }) =>
    withLink(reinvitePerson(context, user, params.id)),
  );
  return router;
}
