import type { Problem } from '@stillstroke/contract/problem';

/** Why somebody could not be signed in, in words that say what to do. */
export function signInWords(problem: Problem): string {
  switch (problem.code) {
    case 'wrong-credentials':
      return 'This e-mail address and password do not go together. Check both; capital letters count in the password.';
    case 'too-many-attempts':
      return problem.detail || 'Too many attempts. Wait a few minutes, then try again.';
    case 'bad-request':
      return problem.issues?.[0]?.message ?? problem.detail;
    default:
      return problem.detail;
  }
}
