/**
 * Who asks: passport with e-mail and password, remembered by a session in PostgreSQL. Requests with a bearer token never
 * touch the session; tokens come with a later feature, so until then each is turned away.
 */
import type { Request, RequestHandler, Response } from 'express';
import passportPkg from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Role } from '#contract/accounts.ts';
import type { Deps } from '../deps.ts';
import { AppError } from './app-error.ts';
import { isBearer } from './bearer.ts';
import type { Actor, SessionControl } from './request-context.ts';
import { stateOf } from './request-state.ts';
import { SESSION_COOKIE, sessions } from './session.ts';

declare global {
  namespace Express {
    interface User {
      readonly personId: string;
    }
  }
}

/** What authentication needs to know of people; handed in, as accounts and teams own it. */
export interface PeopleLookup {
  /** The person to whom both belong, or null; takes as long for an unknown e-mail as for a wrong password. */
  checkPassword(given: { email: string; password: string }): Promise<string | null>;
  /** The person's teams with the role in each; null when there is no such person (any more). */
  findRoles(personId: string): Promise<ReadonlyMap<string, Role> | null>;
  /** Whether the session has neither ended nor expired. */
  sessionStands(sessionId: string): Promise<boolean>;
}

const signedOut: Actor = { kind: 'signed-out' };

export function authentication(deps: Deps, people: PeopleLookup): RequestHandler[] {
  const passport = new passportPkg.Passport();
  passport.serializeUser<string>((user, done) => done(null, user.personId));
  passport.deserializeUser<string>((personId, done) => done(null, { personId }));
  passport.use(
    new LocalStrategy({ usernameField: 'email', session: false }, (email, password, done) => {
      people.checkPassword({ email, password }).then(
        (personId) => done(null, personId === null ? false : { personId }),
        (error) => done(error),
      );
    }),
  );

  const actorOf = async (personId: string | undefined): Promise<Actor> => {
    const roles = personId === undefined ? null : await people.findRoles(personId);
    return personId === undefined || roles === null ? signedOut : { kind: 'person', personId, roles };
  };

  const identify: RequestHandler = async (request, response, next) => {
    const personId = request.user?.personId;
    const sessionId = request.sessionID;
    stateOf(request).identity = {
      actor: await actorOf(personId),
      session: sessionControl({ passport, request, response }),
      lookAgain: async () => ((await people.sessionStands(sessionId)) ? actorOf(personId) : signedOut),
    };
    next();
  };

  return [refuseBearer, sessions(deps), passport.session(), identify];
}

const refuseBearer: RequestHandler = (request, _response, next) => {
  if (!isBearer(request)) return next();
  if (hasSessionCookie(request)) {
    const message = 'The request carries both a session and a token. Send one of them.';
    return next(new AppError('two_identities', message));
  }
  next(new AppError('not_signed_in', 'The token is not known.'));
};

function hasSessionCookie(request: Request): boolean {
  const cookies = (request.get('cookie') ?? '').split(';');
  return cookies.some((cookie) => cookie.split('=')[0]?.trim() === SESSION_COOKIE);
}

function sessionControl(web: {
  passport: passportPkg.Authenticator;
  request: Request;
  response: Response;
}): SessionControl {
  const { passport, request, response } = web;
  const begin = (personId: string): Promise<void> =>
    new Promise((resolve, reject) => {
      // Passport makes a new session id here, so that an id planted before the sign-in is worth nothing.
      request.logIn({ personId }, (error) => (error ? reject(error) : resolve()));
    });
  return {
    begin,
    async signIn() {
      const personId = await new Promise<string | null>((resolve, reject) => {
        const answer: passportPkg.AuthenticateCallback = (error, user) =>
          error ? reject(error) : resolve(user ? user.personId : null);
        passport.authenticate('local', answer)(request, response, reject);
      });
      if (personId !== null) await begin(personId);
      return personId;
    },
    end: () =>
      new Promise((resolve, reject) => {
        request.session.destroy((error) => {
          if (error) return reject(error);
          response.clearCookie(SESSION_COOKIE, { path: '/', httpOnly: true, sameSite: 'lax' });
          resolve();
        });
      }),
  };
}
