/**
 * Who asks: passport with e-mail and password, remembered by a session in PostgreSQL; or a program with an API token, whose
 * requests never touch the session.
 */
import type { Request, RequestHandler, Response } from 'express';
import passportPkg from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { Deps } from '../deps.ts';
import { AppError } from './app-error.ts';
import { bearerToken, isBearer } from './bearer.ts';
import type { Actor, SessionControl, Standing, TokenActor } from './request-context.ts';
import { stateOf } from './request-state.ts';
import { sessions } from './session.ts';
import { SESSION_COOKIE, sessionIdOf } from './session-cookie.ts';

declare module 'express-session' {
  interface SessionData {
    /** What its person is shown of it. */
    about: { readonly beganAt: string; readonly address: string | null; readonly browser: string | null };
  }
}

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
  /** What the person is in which teams; null when there is no such person (any more). */
  findStanding(personId: string): Promise<Standing | null>;
  /** Whose session it is, and what that person is in which teams; null when it has ended or expired. */
  findSession(sessionId: string): Promise<({ readonly personId: string } & Standing) | null>;
  /** Whom a token stands for; null when it is not known, expired, revoked, or its maker may no longer give it. */
  findToken(token: string): Promise<TokenActor | null>;
  /** Whether the session has neither ended nor expired. */
  sessionStands(sessionId: string): Promise<boolean>;
}

/** Browsers call themselves at length. */
const LONGEST_BROWSER = 300;

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
    const standing = personId === undefined ? null : await people.findStanding(personId);
    return personId === undefined || standing === null ? signedOut : { kind: 'person', personId, ...standing };
  };

  const identifyToken: RequestHandler = async (request, _response, next) => {
    if (!isBearer(request)) return next();
    refuseTwoIdentities(request);
    const token = bearerToken(request);
    const find = async (): Promise<Actor> => (await people.findToken(token)) ?? signedOut;
    const actor = await find();
    if (actor.kind === 'signed-out')
      throw new AppError('not_signed_in', 'The token is not known, has expired or was revoked.');
    stateOf(request).identity = {
      actor,
      session: noSession,
      lookAgain: find,
    };
    next();
  };

  const actorOfSession = async (sessionId: string | null): Promise<Actor> => {
    const found = sessionId === null ? null : await people.findSession(sessionId);
    return found === null ? signedOut : { kind: 'person', ...found };
  };

  /** Nobody signs in or out with a request that changes nothing: one query tells who asks. */
  const identifyReader: RequestHandler = async (request, _response, next) => {
    if (isBearer(request) || !SAFE_METHODS.has(request.method)) return next();
    const sessionId = sessionIdOf(request.headers.cookie, deps.sessionSecrets);
    stateOf(request).identity = {
      actor: await actorOfSession(sessionId),
      session: { ...noSession, id: sessionId ?? '' },
      lookAgain: () => actorOfSession(sessionId),
    };
    next();
  };

  const identify: RequestHandler = async (request, response, next) => {
    if (isKnown(request)) return next();
    const personId = request.user?.personId;
    const sessionId = request.sessionID;
    stateOf(request).identity = {
      actor: await actorOf(personId),
      session: sessionControl({ passport, request, response, now: deps.now }),
      lookAgain: async () => ((await people.sessionStands(sessionId)) ? actorOf(personId) : signedOut),
    };
    next();
  };

  const ofBrowsers = [sessions(deps), passport.session()].map(unlessKnown);
  return [identifyToken, identifyReader, ...ofBrowsers, identify];
}

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Of a program, known by its token on every request, and of whoever only reads. */
const noSession: SessionControl = {
  id: '',
  checkPassword: () => Promise.reject(tokenDoesNotSignIn()),
  begin: () => Promise.reject(tokenDoesNotSignIn()),
  end: () => Promise.resolve(),
};

function tokenDoesNotSignIn(): AppError {
  return new AppError(
    'two_identities',
    'A request with a token cannot begin a session. Leave the token out to sign in.',
  );
}

function unlessKnown(handler: RequestHandler): RequestHandler {
  return (request, response, next) => (isKnown(request) ? next() : handler(request, response, next));
}

function isKnown(request: Request): boolean {
  return stateOf(request).identity !== null;
}

function refuseTwoIdentities(request: Request): void {
  if (!hasSessionCookie(request)) return;
  throw new AppError('two_identities', 'The request carries both a session and a token. Send one of them.');
}

function hasSessionCookie(request: Request): boolean {
  const cookies = (request.get('cookie') ?? '').split(';');
  return cookies.some((cookie) => cookie.split('=')[0]?.trim() === SESSION_COOKIE);
}

function sessionControl(web: {
  passport: passportPkg.Authenticator;
  request: Request;
  response: Response;
  now: () => Date;
}): SessionControl {
  const { passport, request, response, now } = web;
  const begin = (personId: string): Promise<void> =>
    new Promise((resolve, reject) => {
      // Passport makes a new session id here, so that an id planted before the sign-in is worth nothing.
      request.logIn({ personId }, (error) => {
        if (error) return reject(error);
        const browser = request.get('user-agent')?.slice(0, LONGEST_BROWSER) ?? null;
        request.session.about = { beganAt: now().toISOString(), address: request.ip ?? null, browser };
        resolve();
      });
    });
  return {
    id: request.sessionID,
    begin,
    checkPassword: () =>
      new Promise<string | null>((resolve, reject) => {
        const answer: passportPkg.AuthenticateCallback = (error, user) =>
          error ? reject(error) : resolve(user ? user.personId : null);
        passport.authenticate('local', answer)(request, response, reject);
      }),
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
