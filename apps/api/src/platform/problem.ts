import type { Problem, ProblemCode } from '@stillstroke/contract/problem';

/** A refusal that the caller is told about: becomes `application/problem+json`. */
export class HttpProblem extends Error {
  constructor(
    readonly status: number,
    readonly code: ProblemCode,
    /** A sentence for people that says what to do. */
    readonly detail: string,
    readonly more: Pick<Problem, 'issues' | 'current'> = {},
  ) {
    super(`${status} ${code}: ${detail}`);
    this.name = 'HttpProblem';
  }

  toJson(): Problem {
    return {
      type: `urn:stillstroke:problem:${this.code}`,
      title: this.code.replaceAll('-', ' '),
      status: this.status,
      detail: this.detail,
      code: this.code,
      ...this.more,
    };
  }
}

/** What the caller may not know of and what is not there look the same. */
export const notFound = (what: string) =>
  new HttpProblem(404, 'not-found', `There is no such ${what}, or it is not yours to see.`);
export const forbidden = (detail = 'Your account may see this but not change it.') =>
  new HttpProblem(403, 'forbidden', detail);
export const notSignedIn = () => new HttpProblem(401, 'not-signed-in', 'Sign in first.');
export const changedMeanwhile = (what: string, current: unknown) =>
  new HttpProblem(
    409,
    'changed-meanwhile',
    `Somebody changed this ${what} meanwhile. Look at what is there now and decide.`,
    {
      current,
    },
  );
/** One field of the body names something that cannot be used: not there, another club's, or in the wrong state. */
export const badField = (path: string, message: string) =>
  new HttpProblem(400, 'bad-request', `${path}: ${message}`, { issues: [{ path, message }] });
