import { AccountView } from '@mereward/shared/accounts/contract';
import {
  AcceptInvitation,
  ChangeFishery,
  FisheryList,
  FisheryView,
  InvitationShown,
  InvitationView,
  Invite,
  MakeFishery,
  PeopleView,
  SetRoles,
} from '@mereward/shared/fisheries/contract';
import { limitSecrets, limitWrongTries } from '../http/limits';
import { deed, read, type Route } from '../http/route';
import { fisheryFound } from './found';
import { acceptInvitation, invitationShown, invite, withdrawInvitation } from './invitations';
import { fisheryList, peopleView } from './queries';
import { changeFishery, fisheryView, makeFishery } from './service';
import { setRoles } from './set-roles';

const fisheries: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries',
      summary: 'Every fishery and its lakes',
      signIn: 'open',
      answer: FisheryList,
    },
    async ({ tx }) => ({ fisheries: await fisheryList(tx) }),
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries',
      summary: 'Make a fishery; its maker becomes its owner',
      signIn: 'needed',
      body: MakeFishery,
      answer: FisheryView,
      status: 201,
    },
    (ctx, { body }) => makeFishery(ctx, body),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId',
      summary: 'One fishery',
      signIn: 'open',
      answer: FisheryView,
    },
    async ({ tx, actor }, { id }) => fisheryView(actor, await fisheryFound(tx, id('fisheryId'))),
  ),
  deed(
    {
      method: 'put',
      path: '/fisheries/:fisheryId',
      summary: 'Change a fishery',
      signIn: 'needed',
      body: ChangeFishery,
      answer: FisheryView,
    },
    (ctx, { id, body }) => changeFishery(ctx, id('fisheryId'), body),
  ),
];

const people: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/people',
      summary: 'Everybody with a role, and who is invited',
      signIn: 'needed',
      answer: PeopleView,
    },
    (ctx, { id }) => peopleView(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'put',
      path: '/fisheries/:fisheryId/people/:accountId',
      summary: 'Set the roles of a person',
      signIn: 'needed',
      body: SetRoles,
      answer: PeopleView,
    },
    (ctx, { id, body }) => setRoles(ctx, { fisheryId: id('fisheryId'), accountId: id('accountId') }, body),
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/invitations',
      summary: 'Invite an address to a role by mail',
      signIn: 'needed',
      body: Invite,
      answer: InvitationView,
      status: 201,
      guards: [limitSecrets],
    },
    (ctx, { id, body }) => invite(ctx, id('fisheryId'), body),
  ),
  deed(
    {
      method: 'delete',
      path: '/fisheries/:fisheryId/invitations/:invitationId',
      summary: 'Withdraw an invitation',
      signIn: 'needed',
    },
    (ctx, { id }) => withdrawInvitation(ctx, id('fisheryId'), id('invitationId')),
  ),
  read(
    {
      method: 'get',
      path: '/invitations/:token',
      summary: 'What a mailed invitation is for',
      signIn: 'open',
      answer: InvitationShown,
      guards: [limitWrongTries],
    },
    (ctx, { req }) => invitationShown(ctx, String(req.params.token)),
  ),
  deed(
    {
      method: 'post',
      path: '/invitations/accept',
      summary: 'Take up an invitation',
      signIn: 'needed',
      body: AcceptInvitation,
      answer: AccountView,
      guards: [limitWrongTries],
    },
    (ctx, { body }) => acceptInvitation(ctx, body.token),
  ),
];

export const fisheryRoutes: readonly Route[] = [...fisheries, ...people];
