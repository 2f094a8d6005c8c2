import type { ErrorRequestHandler } from 'express';
import type { Logger } from 'pino';
import { HttpProblem } from './problem';
import { routeOf } from './request-log';

/** Statuses that body parsers and the router put on their errors, with words of ours. */
const parserWords: Record<number, string> = {
  400: 'The request cannot be read; send well-formed JSON.',
  413: 'The request is too large.',
  415: 'Send the body as application/json.',
};

/**
 * The last handler: every error becomes problem+json. What is not a refusal of ours is logged (without the query's
 * parameters, which may hold people's data) and answered without detail.
 */
export function errorHandler(log: Logger): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    if (res.headersSent) {
      next(error);
      return;
    }
    const problem = asProblem(error);
    if (problem.status >= 500)
      log.error(
        { method: req.method, route: routeOf(req), name: nameOf(error), stack: stackOf(error) },
        'request failed',
      );
    res.status(problem.status).type('application/problem+json').send(JSON.stringify(problem.toJson()));
  };
}

function asProblem(error: unknown): HttpProblem {
  if (error instanceof HttpProblem) return error;
  const status = (error as { status?: unknown } | null)?.status;
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new HttpProblem(status, 'bad-request', parserWords[status] ?? 'The request cannot be read.');
  }
  return new HttpProblem(
    500,
    'internal',
    'Something went wrong on the server. Nothing was changed; try again.',
  );
}

const nameOf = (error: unknown) => (error instanceof Error ? error.name : typeof error);

/** Stack frames only: the first line of an ORM error carries the query's parameters. */
const stackOf = (error: unknown) =>
  error instanceof Error
    ? (error.stack ?? '')
        .split('\n')
        .filter((line) => line.trimStart().startsWith('at '))
        .slice(0, 12)
        .join('\n')
    : undefined;
