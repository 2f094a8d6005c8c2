import type { Request, RequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/**
 * One line an answer: method, route pattern, status, time. Never the address itself (an invitation's holds its token),
 * nor query, headers, cookies or body.
 */
export function requestLog(log: Logger): RequestHandler {
  return pinoHttp<Request, Response>({
    logger: log,
    quietReqLogger: true,
    serializers: { req: () => undefined, res: () => undefined, err: () => undefined },
    customProps: (req, res) => ({ method: req.method, route: routeOf(req), status: res.statusCode }),
    customLogLevel: () => 'info',
    customSuccessMessage: () => 'answered',
    customErrorMessage: () => 'answered',
  });
}

/** The pattern of the route that answered, such as `/api/clips/:id`. */
export function routeOf(req: Request): string | undefined {
  return (req.route as { path?: string } | undefined)?.path;
}
