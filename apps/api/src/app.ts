import { join } from 'node:path';
import cookieParser from 'cookie-parser';
import express, { type Express, type RequestHandler } from 'express';
import { authRoutes } from './auth/auth.routes';
import { signInState } from './auth/sign-in-state';
import { contentPolicy } from './platform/content-policy';
import type { AppContext } from './platform/context';
import { csrfProtection } from './platform/csrf';
import { errorHandler } from './platform/error-handler';
import { healthRoutes } from './platform/health.routes';
import { HttpProblem, notFound } from './platform/problem';
import { requestLog } from './platform/request-log';
import { keyFor, serverSecret } from './platform/server-secret';
import { webPages } from './platform/web-pages';
import { routers as allRouters, type RouterFactory } from './routers';

export interface AppOptions {
  /** The resources to serve; all of them where nothing is said. */
  readonly routers?: readonly RouterFactory[];
  /** Where the built web app lies. */
  readonly webFolder?: string;
}

/** Largest JSON body: a stroke or a mark is far below a kilobyte. */
const jsonLimit = '64kb';

/** Puts the server together over what it is handed; it does not listen and holds no state outside the database. */
export function createApp(context: AppContext, options: AppOptions = {}): Express {
  const { settings, log } = context;
  const secret = serverSecret(settings.dataFolder);
  const state = signInState(context, secret);
  const app = express();
  if (settings.behindTls) app.set('trust proxy', 1);
  app.use(requestLog(log), contentPolicy(settings.behindTls));
  app.use(
    '/api',
    neverKept,
    cookieParser(),
    ...state.handlers,
    csrfProtection(keyFor(secret, 'csrf'), settings.behindTls),
    onlyJson,
    express.json({ limit: jsonLimit, type: 'application/json' }),
  );
  app.use(healthRoutes(), authRoutes(context, state, secret));
  for (const router of options.routers ?? allRouters) app.use(router(context));
  app.use('/api', () => {
    throw notFound('call');
  });
  app.use(webPages(options.webFolder ?? join(process.cwd(), 'dist', 'web')));
  app.use(errorHandler(log));
  return app;
}

/** Answers of the API are for one person now; routes that know better set their own. */
const neverKept: RequestHandler = (_req, res, next) => {
  res.setHeader('Cache-Control', 'no-store');
  next();
};

/** Uploads are multipart, read by their own route; every other body is JSON and says so. */
const onlyJson: RequestHandler = (req, _res, next) => {
  const empty = req.get('content-length') === '0';
  // null: no body at all; false: a body of another kind.
  if (!empty && req.is(['application/json', 'multipart/form-data']) === false) {
    throw new HttpProblem(415, 'bad-request', 'Send the body as application/json.');
  }
  next();
};
