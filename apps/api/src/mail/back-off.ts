const minuteMs = 60_000;
const longestMs = 6 * 60 * minuteMs;
/** About a day and a half in all: long enough for a server that is down over night. */
export const mostAttempts = 14;

/**
 * How long to wait after a failed attempt: a minute, doubled each time up to six hours, a quarter more or less by chance
 * so that what failed together does not come back together.
 *
 * @param attempts made so far, from 1
 * @param chance in [0, 1)
 * @returns milliseconds
 */
export function backOffMs(attempts: number, chance: number): number {
  const wait = Math.min(longestMs, minuteMs * 2 ** (attempts - 1));
  return Math.round(wait * (0.75 + 0.5 * chance));
}
