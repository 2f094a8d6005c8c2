import { join } from 'node:path';
import cookieParser from 'cookie-parser';
import { surface } from '@stillstroke/contract/surface';
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
    jsonBody,
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

const ordinaryBody = express.json({ limit: jsonLimit, type: 'application/json' });

/** The few calls whose bodies may be larger, by what they say of themselves. */
const largeBodies = surface.flatMap(({ path, bodyBytes }) =>
  bodyBytes === undefined
    ? []
    : [
        {
          path: new RegExp(`^${path.replace(/:\w+/g, '[^/]+')}/?$`, 'i'),
          parse: express.json({ limit: bodyBytes, type: 'application/json' }),
        },
      ],
);

/** Reads a JSON body: a large one only from somebody signed in, and only where one belongs. */
const jsonBody: RequestHandler = (req, res, next) => {
  const large = req.user && largeBodies.find(({ path }) => path.test(req.originalUrl.split('?')[0] ?? ''));
  (large?.parse ?? ordinaryBody)(req, res, next);
};

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
