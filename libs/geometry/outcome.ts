/**
 * The answer of every function that can meet input it cannot work with: a value, or a stable reason code.
 * Reasons are codes for programs (`'coincident-joints'`), never sentences; the words are the interface's job.
 */
export type Outcome<T, R extends string = string> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly reason: R };

export function ok<T>(value: T): { readonly ok: true; readonly value: T } {
  return { ok: true, value };
}

export function refused<R extends string>(reason: R): { readonly ok: false; readonly reason: R } {
  return { ok: false, reason };
}
