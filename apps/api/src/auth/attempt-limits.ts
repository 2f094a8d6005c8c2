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

/**
 * Limits guessing without shutting a person out of their own account: strict for one account from one address; wide for
 * one address; wide for one account from anywhere, where browsers that have signed in to it before are counted apart
 * from strangers. Successful attempts do not count.
 */
export function attemptLimiters(context: AppContext, known: KnownBrowsers): RequestHandler[] {
  const limiter = (
    limit: { attempts: number; windowMs: number },
    keyOf: (account: string, address: string, req: Request) => string,
    needsAccount: boolean,
  ) =>
    rateLimit({
      windowMs: limit.windowMs,
      limit: limit.attempts,
      store: new AttemptCounts(context.now),
      skipSuccessfulRequests: true,
      standardHeaders: false,
      legacyHeaders: false,
      skip: (req) => needsAccount && accountIn(req) === null,
      keyGenerator: (req) => keyOf(accountIn(req) ?? '', ipKeyGenerator(req.ip ?? ''), req),
      handler: (req, res, next) => {
        const resetsAt = (req as Request & { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime;
        next(tooMany(res, (resetsAt?.getTime() ?? 0) - context.now().getTime()));
      },
    });
  return [
    limiter(attemptLimits.address, (_account, address) => address, false),
    limiter(attemptLimits.accountFromAddress, (account, address) => `${address} ${account}`, true),
    limiter(
      attemptLimits.account,
      (account, _address, req) => `${known.isKnown(req, account) ? 'known' : 'stranger'} ${account}`,
      true,
    ),
  ];
}

function tooMany(res: Response, waitMs: number): HttpProblem {
  const seconds = Math.max(1, Math.ceil(waitMs / 1000));
  res.setHeader('Retry-After', String(seconds));
  const minutes = Math.ceil(seconds / 60);
  return new HttpProblem(
    429,
    'too-many-attempts',
    `Too many attempts to sign in. Try again in ${minutes === 1 ? 'a minute' : `${minutes} minutes`}.`,
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
