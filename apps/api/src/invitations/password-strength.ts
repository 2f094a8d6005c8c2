import type { ZxcvbnFactory } from '@zxcvbn-ts/core';
import { fold } from '@stillstroke/db/folded';
import { HttpProblem } from '../platform/problem';

/** Estimating takes long on long input; what is strong in its first hundred characters is strong. */
const judged = 100;
/** The library's 0–4: 3 stands for more than 10^8 guesses. */
const enough = 3;
/** A few strung-together words about oneself pass the estimate; this much has to be other than those. */
const lettersOfOwn = 6;

let estimator: Promise<ZxcvbnFactory> | undefined;

/** The word lists are large and seldom needed, so they are read when first asked for. */
function loadEstimator(): Promise<ZxcvbnFactory> {
  estimator ??= Promise.all([import('@zxcvbn-ts/core'), import('@zxcvbn-ts/language-common')]).then(
    ([core, common]) =>
      new core.ZxcvbnFactory({ dictionary: common.dictionary, graphs: common.adjacencyGraphs }),
  );
  return estimator;
}

/**
 * Refuses a password that is common, or made mostly of what anybody knows about the person.
 *
 * @param about name, e-mail, club and the like
 * @throws HttpProblem weak-password
 */
export async function refuseWeakPassword(password: string, about: readonly string[]): Promise<void> {
  const words = about
    .flatMap((text) => [text, ...text.split(/[^\p{L}\p{N}]+/u)])
    .filter((word) => word.length > 2);
  const estimate = (await loadEstimator()).check(password.slice(0, judged), words);
  const personal = lettersBeside(words, password) < lettersOfOwn;
  if (estimate.score >= enough && !personal) return;
  const message = reason(personal ? 'userInputs' : estimate.feedback.warning);
  throw new HttpProblem(400, 'weak-password', message, { issues: [{ path: 'password', message }] });
}

/** How many letters and digits are left of the password when the words are taken out of it. */
function lettersBeside(words: readonly string[], password: string): number {
  const longestFirst = [...words].map(fold).sort((a, b) => b.length - a.length);
  const rest = longestFirst.reduce((left, word) => left.replaceAll(word, ' '), fold(password));
  return rest.match(/[\p{L}\p{N}]/gu)?.length ?? 0;
}

function reason(warning: string | null): string {
  switch (warning) {
    case 'userInputs':
      return 'This password is made of your name, address or club. Use several words that have nothing to do with you.';
    case 'simpleRepeat':
    case 'extendedRepeat':
      return 'This password repeats itself, which makes it easy to guess. Use several unrelated words.';
    case 'sequences':
    case 'straightRow':
    case 'keyPattern':
      return 'This password is a run of neighbouring keys or letters. Use several unrelated words.';
    default:
      return 'This password is among those that get guessed first. Use several unrelated words.';
  }
}
