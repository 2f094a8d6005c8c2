import { randomBytes } from 'node:crypto';
import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';

/**
 * Response headers that narrow what a page may do: only files of this server, no inline script, no foreign host, no
 * framing. Styles that Angular adds at run time carry the nonce of the page they were served with.
 */
export function contentPolicy(behindTls: boolean): RequestHandler {
  const headers = helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", (_req, res) => `'nonce-${nonceOf(res as Response)}'`],
        imgSrc: ["'self'", 'blob:', 'data:'],
        mediaSrc: ["'self'", 'blob:'],
        workerSrc: ["'self'", 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
      },
    },
    strictTransportSecurity: behindTls ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    referrerPolicy: { policy: 'no-referrer' },
    xFrameOptions: { action: 'deny' },
  });
  return (req, res, next) => {
    res.locals['cspNonce'] = randomBytes(16).toString('base64');
    headers(req, res, next);
  };
}

/** The nonce of this answer's policy. */
export function nonceOf(res: Response): string {
  return res.locals['cspNonce'] as string;
}
