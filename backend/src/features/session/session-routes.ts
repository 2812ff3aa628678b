import {
  InvitationAcceptance,
  OwnSessions,
  PasswordResetCompletion,
  PasswordResetRequest,
  SessionAnswer,
  SignIn,
} from '@shared/contract';
import * as z from 'zod';
import { Answer, NO_CONTENT, personRoute, publicRoute, type Route } from '../../middleware/routes';
import { sessionCookieName } from '../../middleware/session';
import {
  acceptInvitation,
  completePasswordReset,
  mailPasswordReset,
  ownSessions,
  revokeSession,
  sessionAnswer,
  signIn,
} from './session-service';

/** Signing in and out, one's own sessions, and the one-time links that lead to a password. */
export const sessionRoutes: readonly Route[] = [
  personRoute({
    method: 'get',
    path: '/api/session',
    summary: 'Who is signed in, with which roles in which studies',
    permission: 'signed-in',
    answer: SessionAnswer,
    handler: ({ services, person }) => sessionAnswer(services, person),
  }),
  publicRoute({
    method: 'post',
    path: '/api/session',
    summary: 'Sign in',
    body: SignIn,
    answer: SessionAnswer,
    handler: ({ services, request, body }) => signIn(services, request, body.email),
  }),
  personRoute({
    method: 'delete',
    path: '/api/session',
    summary: 'Sign out',
    permission: 'signed-in',
    status: 204,
    handler: async ({ services, request, response }) => {
      await services.authenticator.endSession(request);
      const { secureCookies } = services.config;
      response.clearCookie(sessionCookieName(secureCookies), {
        path: '/',
        httpOnly: true,
        sameSite: 'lax',
        secure: secureCookies,
      });
      return NO_CONTENT;
    },
  }),
  personRoute({
    method: 'get',
    path: '/api/session/all',
    summary: "One's own open sessions",
    permission: 'signed-in',
    answer: OwnSessions,
    handler: async ({ services, person, request }) => ({
      sessions: await ownSessions(services, person, request.sessionID),
    }),
  }),
  personRoute({
    method: 'delete',
    path: '/api/session/all/:sessionId',
    summary: "End one of one's own sessions",
    permission: 'signed-in',
    params: z.strictObject({ sessionId: z.uuid() }),
    status: 204,
    handler: async ({ services, person, params }) => {
      await revokeSession(services, person, params.sessionId);
      return NO_CONTENT;
    },
  }),
  publicRoute({
    method: 'post',
    path: '/api/session/password-reset',
    summary: 'Ask for a link to choose a new password; answers the same whether or not the account exists',
    body: PasswordResetRequest,
    status: 202,
    handler: async ({ services, request, body }) => {
      await services.throttles.countMailRequest(request.ip ?? '');
      services.background.start('password reset mail', () => mailPasswordReset(services, body.email));
      return new Answer(202);
    },
  }),
  publicRoute({
    method: 'post',
    path: '/api/password-resets/complete',
    summary: 'Choose a new password with the code of a mailed link',
    body: PasswordResetCompletion,
    status: 204,
    handler: async ({ services, body }) => {
      await completePasswordReset(services, body.token, body.password);
      return NO_CONTENT;
    },
  }),
  publicRoute({
    method: 'post',
    path: '/api/invitations/accept',
    summary: 'Accept an invitation with the code of a mailed link and choose a password',
    body: InvitationAcceptance,
    status: 204,
    handler: async ({ services, body }) => {
      await acceptInvitation(services, body);
      return NO_CONTENT;
    },
  }),
];
