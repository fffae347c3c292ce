import { Router, type Request, type Response } from 'express';
import {
  acceptInvitationSchema,
  invitationSubjectSchema,
  sessionJsonSchema,
  signInInputSchema,
  userJsonSchema,
} from '@shared/schemas/account';
import { z } from 'zod';
import { endpoint, mountedAt } from '../endpoint';
import { HttpError, unauthenticated } from '../errors';
import { sameOrigin } from '../middleware/origin';
import { signInTries } from '../middleware/limits';
import { Customer } from '../models/Customer';
import { Lab } from '../models/Lab';
import { Person } from '../models/Person';
import { Session } from '../models/Session';
import { hashPassword, isPassword } from '../passwords';
import { presentUser } from '../presenters/account';
import { services } from '../runtime';
import { findInvitation } from '../services/findInvitation';
import { openSession, SESSION_HOURS } from '../services/openSession';
import { recordEvent } from '../services/recordEvent';
import { refreshSession } from '../services/refreshSession';

const COOKIE = 'cragline_refresh';
const COOKIE_PATH = '/api/auth';
const LAB_AND_CUSTOMER = [
  { model: Lab, as: 'lab' },
  { model: Customer, as: 'customer' },
];
const nothingSchema = z.object({});

const cookieOptions = () =>
  ({
    httpOnly: true,
    sameSite: 'strict',
    secure: services().config.publicUrl.startsWith('https://'),
    path: COOKIE_PATH,
    maxAge: SESSION_HOURS * 3_600_000,
  }) as const;

const readCookie = (request: Request) => {
  const value: unknown = (request.cookies as Record<string, unknown>)[COOKIE];
  return typeof value === 'string' ? value : '';
};

function keepRefreshToken(response: Response, token: string | null): void {
  if (token !== null) response.cookie(COOKIE, token, cookieOptions());
}

function forgetRefreshToken(response: Response): void {
  const { maxAge: _maxAge, ...options } = cookieOptions();
  response.clearCookie(COOKIE, options);
}

export const authRouter = mountedAt(Router(), '/auth');
authRouter.use(['/sign-in', '/refresh', '/sign-out', '/accept-invitation'], sameOrigin);
authRouter.use('/sign-in', signInTries());

endpoint(authRouter, {
  method: 'post',
  path: '/sign-in',
  summary: 'Sign in with e-mail and password',
  access: 'public',
  body: signInInputSchema,
  answer: sessionJsonSchema,
  async handle({ body, request, response }) {
    const email = body.email.trim().toLowerCase().normalize('NFC');
    const person = await Person.findOne({ where: { email }, include: LAB_AND_CUSTOMER });
    const isRight = await isPassword(body.password, person?.passwordHash ?? null);
    const { requestId } = request;
    return services().sequelize.transaction(async (transaction) => {
      if (!person?.isActive || !isRight)
        throw unauthenticated('This e-mail and password do not go together.');
      const opened = await openSession(person, transaction);
      await recordEvent(
        { labId: person.labId, person, action: 'signed in', requestId },
        transaction,
      );
      keepRefreshToken(response, opened.refreshToken);
      return { accessToken: opened.accessToken, user: presentUser(person) };
    });
  },
});

endpoint(authRouter, {
  method: 'post',
  path: '/refresh',
  summary: 'Exchange the refresh cookie for a new access token',
  access: 'public',
  body: z.strictObject({}),
  answer: sessionJsonSchema,
  async handle({ request, response }) {
    const refreshed = await services().sequelize.transaction((transaction) =>
      refreshSession(readCookie(request), request.requestId, transaction),
    );
    if (!refreshed) {
      forgetRefreshToken(response);
      throw unauthenticated('Your session has ended. Sign in again; what you typed is kept.');
    }
    keepRefreshToken(response, refreshed.session.refreshToken);
    return { accessToken: refreshed.session.accessToken, user: presentUser(refreshed.person) };
  },
});

endpoint(authRouter, {
  method: 'post',
  path: '/sign-out',
  summary: 'End this session, or with `everywhere` all sessions of this person',
  access: 'signedIn',
  body: z.strictObject({ everywhere: z.boolean().default(false) }),
  answer: nothingSchema,
  async handle({ ctx, body, response }) {
    const { actor, transaction, requestId } = ctx;
    const which = body.everywhere ? { personId: actor.id } : { id: actor.sessionId };
    await Session.update(
      { revokedAt: new Date() },
      { where: { ...which, labId: actor.labId, revokedAt: null }, transaction },
    );
    const action = body.everywhere ? 'signed out everywhere' : 'signed out';
    await recordEvent({ labId: actor.labId, person: actor, action, requestId }, transaction);
    forgetRefreshToken(response);
    return {};
  },
});

endpoint(authRouter, {
  method: 'get',
  path: '/me',
  summary: 'Who is signed in',
  access: 'signedIn',
  answer: userJsonSchema,
  async handle({ ctx }) {
    const { actor, transaction } = ctx;
    const person = await Person.findByPk(actor.id, {
      include: LAB_AND_CUSTOMER,
      transaction,
      rejectOnEmpty: true,
    });
    return presentUser(person);
  },
});

endpoint(authRouter, {
  method: 'post',
  path: '/invitation',
  summary: 'Whom a one-time address is for',
  access: 'public',
  body: z.strictObject({ token: z.string().min(20).max(200) }),
  answer: invitationSubjectSchema,
  async handle({ body }) {
    return services().sequelize.transaction(async (transaction) => {
      const { person, lab } = await findInvitation(body.token, transaction);
      return { name: person.name, email: person.email, labName: lab.name };
    });
  },
});

endpoint(authRouter, {
  method: 'post',
  path: '/accept-invitation',
  summary: 'Choose a password at a one-time address; signs in',
  access: 'public',
  body: acceptInvitationSchema,
  answer: sessionJsonSchema,
  async handle({ body, request, response }) {
    const passwordHash = await hashPassword(body.password);
    const { requestId } = request;
    return services().sequelize.transaction(async (transaction) => {
      const { invitation, person, lab } = await findInvitation(body.token, transaction);
      const isCommon = [person.email, person.name, lab.name].some(
        (word) => word.length >= 4 && body.password.toLowerCase().includes(word.toLowerCase()),
      );
      if (isCommon)
        throw new HttpError(
          400,
          'invalid',
          'A password that holds your name, your address or the lab’s name is easily guessed.',
          {
            issues: [
              {
                path: 'password',
                message:
                  'Leave out your name, your address and the lab’s name: they are easily guessed.',
              },
            ],
          },
        );
      const { id, labId, name, roles, customerId } = person;
      const actor = { id, labId, name, roles, customerId, sessionId: 0 };
      await person.update({ passwordHash }, { transaction, actor, requestId } as object);
      await invitation.update({ usedAt: new Date() }, { transaction });
      await Session.update(
        { revokedAt: new Date() },
        { where: { personId: id, revokedAt: null }, transaction },
      );
      await recordEvent({ labId, person, action: 'chose a password', requestId }, transaction);
      const opened = await openSession(person, transaction);
      keepRefreshToken(response, opened.refreshToken);
      return { accessToken: opened.accessToken, user: presentUser(person) };
    });
  },
});
