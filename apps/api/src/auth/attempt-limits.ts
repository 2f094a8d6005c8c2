import { createHmac, timingSafeEqual } from 'node:crypto';
import type { Request, RequestHandler, Response } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { AppContext } from '../platform/context';
import { HttpProblem } from '../platform/problem';
import { keyFor } from '../platform/server-secret';
import { AttemptCounts } from './attempt-counts';

const minute = 60_000;
const year = 365 * 24 * 60 * minute;
const knownCookie = 'stillstroke-known';
const knownMost = 6;

/** Failed attempts allowed in a window. One club often shares one address, so the address alone is generous. */
export const attemptLimits = {
  accountFromAddress: { attempts: 8, windowMs: 15 * minute },
  address: { attempts: 60, windowMs: 15 * minute },
  account: { attempts: 60, windowMs: 30 * minute },
} as const;

/** Mails with a new password that may be asked for in a window, whether there is such an account or not. */
export const wishLimits = {
  accountFromAddress: { attempts: 3, windowMs: 15 * minute },
  address: { attempts: 30, windowMs: 15 * minute },
  account: { attempts: 8, windowMs: 60 * minute },
} as const;

interface Limit {
  readonly limit: { readonly attempts: number; readonly windowMs: number };
  readonly keyOf: (account: string, address: string, req: Request) => string;
  /** Whether it counts by account: a body without one is then let through to be refused as malformed. */
  readonly needsAccount: boolean;
  readonly countSuccess: boolean;
  /** What there was too much of, as in "Too many …". */
  readonly what: string;
}

function limiter(
  context: AppContext,
  { limit, keyOf, needsAccount, countSuccess, what }: Limit,
): RequestHandler {
  return rateLimit({
    windowMs: limit.windowMs,
    limit: limit.attempts,
    store: new AttemptCounts(context.now),
    skipSuccessfulRequests: !countSuccess,
    standardHeaders: false,
    legacyHeaders: false,
    skip: (req) => needsAccount && accountIn(req) === null,
    keyGenerator: (req) => keyOf(accountIn(req) ?? '', ipKeyGenerator(req.ip ?? ''), req),
    handler: (req, res, next) => {
      const resetsAt = (req as Request & { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime;
      next(tooMany(res, what, (resetsAt?.getTime() ?? 0) - context.now().getTime()));
    },
  });
}

/**
 * Limits guessing without shutting a person out of their own account: strict for one account from one address; wide for
 * one address; wide for one account from anywhere, where browsers that have signed in to it before are counted apart
 * from strangers. Successful attempts do not count.
 */
export function attemptLimiters(context: AppContext, known: KnownBrowsers): RequestHandler[] {
  const shared = { countSuccess: false, what: 'attempts to sign in' };
  return [
    limiter(context, {
      ...shared,
      limit: attemptLimits.address,
      keyOf: (_account, address) => address,
      needsAccount: false,
    }),
    limiter(context, {
      ...shared,
      limit: attemptLimits.accountFromAddress,
      keyOf: (account, address) => `${address} ${account}`,
      needsAccount: true,
    }),
    limiter(context, {
      ...shared,
      limit: attemptLimits.account,
      keyOf: (account, _address, req) => `${known.isKnown(req, account) ? 'known' : 'stranger'} ${account}`,
      needsAccount: true,
    }),
  ];
}

/** Limits how many mails with a new password can be made to go out: every wish counts, granted or not. */
export function wishLimiters(context: AppContext): RequestHandler[] {
  const shared = { countSuccess: true, what: 'mails asked for' };
  return [
    limiter(context, {
      ...shared,
      limit: wishLimits.address,
      keyOf: (_account, address) => address,
      needsAccount: false,
    }),
    limiter(context, {
      ...shared,
      limit: wishLimits.accountFromAddress,
      keyOf: (account, address) => `${address} ${account}`,
      needsAccount: true,
    }),
    limiter(context, {
      ...shared,
      limit: wishLimits.account,
      keyOf: (account) => account,
      needsAccount: true,
    }),
  ];
}

function tooMany(res: Response, what: string, waitMs: number): HttpProblem {
  const seconds = Math.max(1, Math.ceil(waitMs / 1000));
  res.setHeader('Retry-After', String(seconds));
  const minutes = Math.ceil(seconds / 60);
  return new HttpProblem(
    429,
    'too-many-attempts',
    `Too many ${what}. Try again in ${minutes === 1 ? 'a minute' : `${minutes} minutes`}.`,
  );
}

function accountIn(req: Request): string | null {
  const email = (req.body as { email?: unknown } | undefined)?.email;
  return typeof email === 'string' ? email.trim().toLowerCase().slice(0, 254) : null;
}

/** Which accounts have signed in from this browser: signed marks in a cookie of its own, useless for signing in. */
export class KnownBrowsers {
  private readonly key: string;

  constructor(
    secret: string,
    private readonly behindTls: boolean,
  ) {
    this.key = keyFor(secret, 'known browser');
  }

  isKnown(req: Request, account: string): boolean {
    const mark = Buffer.from(this.mark(account));
    return this.marks(req).some((kept) => {
      const given = Buffer.from(kept);
      return given.length === mark.length && timingSafeEqual(given, mark);
    });
  }

  remember(req: Request, res: Response, account: string): void {
    const mark = this.mark(account);
    const marks = [mark, ...this.marks(req).filter((kept) => kept !== mark)].slice(0, knownMost);
    res.cookie(knownCookie, marks.join('.'), {
      httpOnly: true,
      sameSite: 'lax',
      secure: this.behindTls,
      path: '/api/auth',
      maxAge: year,
    });
  }

  private marks(req: Request): string[] {
    const value = (req.cookies as Record<string, unknown>)[knownCookie];
    return typeof value === 'string' ? value.split('.').slice(0, knownMost) : [];
  }

  private mark(account: string): string {
    return createHmac('sha256', this.key).update(account).digest('base64url');
  }
}
