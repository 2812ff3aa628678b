import { Invitation, MemberRoles, PeopleAnswer, PersonAnswer, PersonChange, StudyMembers } from '@shared/contract';
import * as z from 'zod';
import { rememberAnswer } from '../../middleware/idempotency';
import { Answer, NO_CONTENT, personRoute, type Route, studyRead, studyWrite } from '../../middleware/routes';
import { changePerson, inviteAgain, invitePerson, setMemberRoles } from './people-service';
import { peopleAnswer, personAnswer, studyMembers } from './people-views';

const PersonId = z.strictObject({ personId: z.uuid() });

/** People and their roles: what administrators do, and what members of a study see of each other. */
export const peopleRoutes: readonly Route[] = [
  personRoute({
    method: 'get',
    path: '/api/people',
    summary: 'Everybody with all their roles',
    permission: 'administrator',
    answer: PeopleAnswer,
    handler: ({ services }) => peopleAnswer(services.sequelize),
  }),
  personRoute({
    method: 'post',
    path: '/api/people',
    summary: 'Invite somebody by mail, with roles in studies',
    permission: 'administrator',
    body: Invitation,
    answer: PersonAnswer,
    status: 201,
    handler: async ({ services, person, body }) =>
      personAnswer(services.sequelize, await invitePerson(services, person, body)),
  }),
  personRoute({
    method: 'post',
    path: '/api/people/:personId/invitation',
    summary: 'Send a fresh invitation to somebody who has not accepted yet',
    permission: 'administrator',
    params: PersonId,
    status: 202,
    handler: async ({ services, person, params }) => {
      await inviteAgain(services, person, params.personId);
      return new Answer(202);
    },
  }),
  personRoute({
    method: 'patch',
    path: '/api/people/:personId',
    summary: 'Rename, disable or enable a person, or give or take administration',
    permission: 'administrator',
    params: PersonId,
    body: PersonChange,
    answer: PersonAnswer,
    handler: async ({ services, person, params, body }) => {
      await changePerson(services, person, params.personId, body);
      return personAnswer(services.sequelize, params.personId);
    },
  }),
  studyRead({
    path: '/api/studies/:study/members',
    summary: 'Names and roles of the members',
    permission: 'member-or-administrator',
    answer: StudyMembers,
    handler: async ({ services, study }) => ({ members: await studyMembers(services.sequelize, study.id) }),
  }),
  studyWrite({
    method: 'put',
    path: '/api/studies/:study/members/:personId',
    summary: 'Give a person exactly these roles in the study; none takes them out of it',
    permission: 'administrator',
    params: PersonId,
    body: MemberRoles,
    status: 204,
    handler: async ({ services, person, study, params, body, idempotency }) => {
      await services.sequelize.transaction(async (transaction) => {
        await setMemberRoles(transaction, person, study.id, params.personId, body.roles);
        await rememberAnswer(transaction, idempotency, NO_CONTENT);
      });
      return NO_CONTENT;
    },
  }),
];
