import type { Endpoint } from '@stillstroke/contract/endpoint';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Request, Response, Router } from 'express';
import type * as z from 'zod';
import { forbidden, HttpProblem, notFound, notSignedIn } from './problem';

/** A request whose parts have been checked against the endpoint's schemas; handlers see nothing unchecked. */
export interface Call<P, Q, B> {
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  readonly req: Request;
  readonly res: Response;
}

/** As {@link Call}, for endpoints that need somebody signed in. */
export interface SignedInCall<P, Q, B> extends Call<P, Q, B> {
  readonly user: SignedInUser;
}

type Handler<C, A> = (call: C) => A | Promise<A>;

/**
 * Mounts an endpoint for signed-in callers of the roles it names. Order of refusals: 401, 403 or 404 by role, then
 * schemas (400). A role that may not call the endpoint gets 404 for a thing by id and 403 otherwise, so that
 * nobody learns from the difference what exists.
 */
export function mount<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, A extends z.ZodType>(
  router: Router,
  endpoint: Endpoint<P, Q, B, A>,
  handler: Handler<SignedInCall<z.output<P>, z.output<Q>, z.output<B>>, z.output<A> | void>,
): void {
  router[endpoint.method](endpoint.path, async (req, res) => {
    const user = req.user;
    if (!user) throw notSignedIn();
    if (Array.isArray(endpoint.access) && !endpoint.access.includes(user.role)) {
      throw req.method === 'GET' && 'id' in req.params
        ? notFound('page')
        : forbidden('Your account may not do this.');
    }
    answer(endpoint, res, await handler({ ...parts(endpoint, req), user, req, res }));
  });
}

/** Mounts an endpoint that anybody may call. */
export function mountPublic<
  P extends z.ZodType,
  Q extends z.ZodType,
  B extends z.ZodType,
  A extends z.ZodType,
>(
  router: Router,
  endpoint: Endpoint<P, Q, B, A>,
  handler: Handler<Call<z.output<P>, z.output<Q>, z.output<B>>, z.output<A> | void>,
): void {
  if (endpoint.access !== 'public') throw new Error(`${endpoint.path} is not public: use mount`);
  router[endpoint.method](endpoint.path, async (req, res) => {
    answer(endpoint, res, await handler({ ...parts(endpoint, req), req, res }));
  });
}

function parts<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType>(
  endpoint: Endpoint<P, Q, B>,
  req: Request,
): { params: z.output<P>; query: z.output<Q>; body: z.output<B> } {
  if (endpoint.bodyKind !== 'multipart' && req.is('multipart/form-data')) {
    throw new HttpProblem(415, 'bad-request', 'Send the body as application/json.');
  }
  // An id that cannot be one names nothing: 404, as for any id that does not exist.
  const params = endpoint.params?.safeParse(req.params);
  if (params?.success === false) throw notFound('page');
  return {
    params: params?.data as z.output<P>,
    query: checked(endpoint.query, req.query, 'query') as z.output<Q>,
    body: (endpoint.bodyKind === 'multipart'
      ? undefined
      : checked(endpoint.body, req.body, 'body')) as z.output<B>,
  };
}

function checked(schema: z.ZodType | undefined, value: unknown, where: string): unknown {
  const empty =
    value === undefined || (typeof value === 'object' && value !== null && Object.keys(value).length === 0);
  if (!schema) {
    if (!empty) throw new HttpProblem(400, 'bad-request', `This call takes no ${where}; leave it out.`);
    return undefined;
  }
  const parsed = schema.safeParse(value ?? {});
  if (parsed.success) return parsed.data;
  throw badRequest(parsed.error.issues);
}

/** Turns schema issues into the problem that lists them by path. */
export function badRequest(issues: readonly z.core.$ZodIssue[]): HttpProblem {
  const listed = issues
    .slice(0, 20)
    .map(({ path, message }) => ({ path: path.map(String).join('.'), message }));
  const first = listed[0];
  const detail = first
    ? `${first.path ? `${first.path}: ` : ''}${first.message}`
    : 'The request cannot be read.';
  return new HttpProblem(400, 'bad-request', detail, { issues: listed });
}

function answer(endpoint: Endpoint, res: Response, value: unknown): void {
  if (endpoint.answerKind === 'bytes') return;
  if (endpoint.answerKind === 'none') {
    res.status(endpoint.status ?? 204).end();
    return;
  }
  res.status(endpoint.status ?? 200).json(value);
}
