import { HttpErrorResponse } from '@angular/common/http';
import { problemSchema, type Problem } from '@stillstroke/contract/problem';

const offline: Problem = {
  type: 'urn:stillstroke:problem:offline',
  title: 'offline',
  status: 0,
  detail: 'The server cannot be reached. Check the connection; nothing you typed is lost.',
  code: 'internal',
};

/** The problem that a failed request carries; a lost connection and an unreadable answer get words of ours (status 0 and 5xx). */
export function problemOf(error: unknown): Problem {
  const response = error instanceof HttpErrorResponse ? error : undefined;
  if (response?.status === 0) return offline;
  const parsed = problemSchema.safeParse(response?.error);
  if (parsed.success) return parsed.data;
  return {
    type: 'about:blank',
    title: 'error',
    status: response?.status ?? 500,
    detail: 'Something went wrong. Load the page again; if it stays, tell whoever runs this server.',
    code: 'internal',
  };
}
