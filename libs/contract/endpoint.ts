import type * as z from 'zod';
import type { Role } from './roles';

/** Who may call an endpoint at all; what of it a caller may see is decided by the service behind it. */
export type Access = 'public' | 'signed-in' | readonly Role[];

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** How the request body travels: JSON by default, `multipart` for uploads (streamed, never parsed into memory). */
export type BodyKind = 'json' | 'multipart';

/** What comes back: JSON, raw bytes of a file, or nothing (204). */
export type AnswerKind = 'json' | 'bytes' | 'none';

/**
 * One call of the HTTP surface, described once: the server mounts and validates from it, the web app calls through it,
 * `/api/openapi.json` and the table of all routes are made from it.
 */
export interface Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Answer extends z.ZodType = z.ZodType,
> {
  readonly method: Method;
  /** Express path with named parameters, e.g. `/api/clips/:id/marks`. */
  readonly path: string;
  readonly access: Access;
  readonly summary: string;
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  readonly answer?: Answer;
  readonly bodyKind?: BodyKind;
  readonly answerKind?: AnswerKind;
  /** Largest JSON body, bytes, where it may be larger than those of all other calls. */
  readonly bodyBytes?: number;
  /** Success status; 200 where nothing is said. */
  readonly status?: number;
}

/** Keeps the schema types of a description; see {@link Endpoint}. */
export function endpoint<
  Params extends z.ZodType = z.ZodUndefined,
  Query extends z.ZodType = z.ZodUndefined,
  Body extends z.ZodType = z.ZodUndefined,
  Answer extends z.ZodType = z.ZodUndefined,
>(description: Endpoint<Params, Query, Body, Answer>): Endpoint<Params, Query, Body, Answer> {
  return description;
}

export type ParamsOf<E> = E extends Endpoint<infer P, z.ZodType, z.ZodType, z.ZodType> ? z.output<P> : never;
export type QueryOf<E> = E extends Endpoint<z.ZodType, infer Q, z.ZodType, z.ZodType> ? z.output<Q> : never;
/** What a caller may leave out of the query because the schema has a default for it. */
export type QueryInputOf<E> =
  E extends Endpoint<z.ZodType, infer Q, z.ZodType, z.ZodType> ? z.input<Q> : never;
export type BodyOf<E> = E extends Endpoint<z.ZodType, z.ZodType, infer B, z.ZodType> ? z.output<B> : never;
export type BodyInputOf<E> =
  E extends Endpoint<z.ZodType, z.ZodType, infer B, z.ZodType> ? z.input<B> : never;
export type AnswerOf<E> = E extends Endpoint<z.ZodType, z.ZodType, z.ZodType, infer A> ? z.output<A> : never;
