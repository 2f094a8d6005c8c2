import { surface } from '@stillstroke/contract/surface';
import { doubleCsrf } from 'csrf-csrf';
import type { RequestHandler } from 'express';
import { HttpProblem, notSignedIn } from './problem';

const cookieName = 'XSRF-TOKEN';
const harmless = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Changing calls that nobody has to be signed in for. */
const publicChanges = surface
  .filter((endpoint) => endpoint.access === 'public' && endpoint.method !== 'get')
  .map((endpoint) => new RegExp(`^${endpoint.path.replace(/:\w+/g, '[^/]+')}/?$`, 'i'));

/**
 * Every GET sets the cookie `XSRF-TOKEN` that scripts of this origin can read; every change must send its value as header
 * `X-XSRF-TOKEN`. The token is signed and bound to the sign-in, so one planted or kept from before is refused. A refusal
 * sets a usable token as well: the next try works.
 */
export function csrfProtection(key: string, behindTls: boolean): RequestHandler {
  const { generateCsrfToken, validateRequest } = doubleCsrf({
    getSecret: () => key,
    getSessionIdentifier: (req) => (req.user ? req.sessionID : ''),
    cookieName,
    cookieOptions: { httpOnly: false, sameSite: 'lax', path: '/', secure: behindTls },
    getCsrfTokenFromRequest: (req) => req.get('x-xsrf-token'),
  });
  return (req, res, next) => {
    const cookies = req.cookies as Record<string, unknown>;
    // A cookie may arrive as JSON; the token never does.
    if (typeof cookies[cookieName] !== 'string') delete cookies[cookieName];
    req.csrfToken = (options) => generateCsrfToken(req, res, options);
    if (harmless.has(req.method)) {
      generateCsrfToken(req, res);
      next();
      return;
    }
    if (validateRequest(req)) {
      next();
      return;
    }
    const path = `${req.baseUrl}${req.path}`;
    if (!req.user && !publicChanges.some((pattern) => pattern.test(path))) throw notSignedIn();
    generateCsrfToken(req, res);
    throw new HttpProblem(
      403,
      'csrf',
      'The request did not prove that it comes from this application. Load the page again and repeat it.',
    );
  };
}
