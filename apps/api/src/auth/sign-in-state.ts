import type { SignedInUser } from '@stillstroke/contract/auth';
import { emailSchema } from '@stillstroke/contract/fields';
import type { Request, RequestHandler, Response } from 'express';
import session from 'express-session';
import passport from 'passport';
import { Strategy } from 'passport-local';
import { z } from 'zod';
import type { AppContext } from '../platform/context';
import { keyFor } from '../platform/server-secret';
import { activeUser, activeUserByEmail } from './accounts';
import { passwordMatches } from './passwords';
import { SignInStore } from './sign-in-store';

const day = 24 * 60 * 60 * 1000;
/** Without any request for this long, one is signed out. */
const idleLimit = 14 * day;
/** However busy, one signs in anew after this long. */
const ageLimit = 60 * day;

/** What the store keeps of a signed-in browser. */
const keptSchema = z.object({ id: z.string(), since: z.number() });

export interface SignInState {
  /** Put these before anything that asks who is signed in. */
  readonly handlers: readonly RequestHandler[];
  /** The account that e-mail and password in the request's body belong to; null when they do not. */
  check(req: Request, res: Response): Promise<SignedInUser | null>;
}

/** Wires sign-in: store, cookie and passport. Whether the account is still active is asked anew at every request. */
export function signInState(context: AppContext, secret: string): SignInState {
  const authenticator = new passport.Passport();
  const isoNow = () => context.now().getTime();
  authenticator.serializeUser((user, done) => done(null, { id: user.id, since: isoNow() }));
  authenticator.deserializeUser(
    (value: unknown, done: (error: unknown, user?: Express.User | false) => void) => {
      const kept = keptSchema.safeParse(value);
      const tooOld = !kept.success || isoNow() - kept.data.since > ageLimit;
      done(null, (tooOld ? null : activeUser(context.db, kept.data.id)) ?? false);
    },
  );
  authenticator.use(
    new Strategy({ usernameField: 'email' }, (email, password, done) => {
      verify(context, email, password).then(
        (user) => done(null, user ?? false),
        (error: unknown) => done(error),
      );
    }),
  );
  return {
    handlers: [
      session({
        name: signInCookie(context.settings.behindTls),
        secret: keyFor(secret, 'sign-in cookie'),
        store: new SignInStore(context, idleLimit),
        resave: false,
        rolling: true,
        saveUninitialized: false,
        cookie: {
          httpOnly: true,
          sameSite: 'lax',
          secure: context.settings.behindTls,
          path: '/',
          maxAge: idleLimit,
        },
      }),
      authenticator.session() as RequestHandler,
    ],
    check: (req, res) =>
      new Promise((resolve, reject) => {
        const outcome = (error: unknown, user?: Express.User | false) => {
          if (error) reject(error instanceof Error ? error : new Error('sign-in failed'));
          else resolve(user || null);
        };
        const authenticate = authenticator.authenticate('local', outcome) as RequestHandler;
        void authenticate(req, res, reject);
      }),
  };
}

/** Behind TLS the name's prefix makes browsers refuse the cookie from any other host or path. */
export function signInCookie(behindTls: boolean): string {
  return behindTls ? '__Host-stillstroke' : 'stillstroke';
}

async function verify(context: AppContext, email: string, password: string): Promise<SignedInUser | null> {
  const address = emailSchema.safeParse(email);
  const found = address.success ? activeUserByEmail(context.db, address.data) : null;
  const matches = await passwordMatches(found?.passwordHash ?? null, password);
  return matches && found ? found.user : null;
}

/**
 * Signs the account in on this browser: under a new id (one known from before is worthless), with a fresh CSRF token
 * bound to it.
 */
export async function startSignIn(req: Request, user: SignedInUser): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    req.logIn(user, (error: unknown) => (error ? reject(asError(error)) : resolve()));
  });
  req.csrfToken?.({ overwrite: true });
}

/** Signs out: the row is gone and the cookie cleared, with a CSRF token for whoever signs in next. */
export async function endSignIn(req: Request, res: Response, behindTls: boolean): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    req.session.destroy((error: unknown) => (error ? reject(asError(error)) : resolve()));
  });
  delete req.user;
  res.clearCookie(signInCookie(behindTls), { path: '/', httpOnly: true, sameSite: 'lax', secure: behindTls });
  req.csrfToken?.({ overwrite: true });
}

const asError = (error: unknown) => (error instanceof Error ? error : new Error('sign-in state not kept'));
