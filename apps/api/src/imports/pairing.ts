import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { ExportClip, ExportFile } from '@stillstroke/contract/export';
import type { previewImport } from '@stillstroke/contract/import';
import type { ClipRow } from '../clips/clip-answer';
import { badField } from '../platform/problem';

export interface Pair {
  readonly from: ExportClip;
  /** Of the file's session. */
  readonly date: string;
  readonly to: ClipRow | null;
  readonly foundBy: 'film' | 'choice' | null;
}

type Wanted = BodyOf<typeof previewImport>['pairs'];

/**
 * Which clip of the file goes onto which of ours: as chosen, else the one of the same film. One clip of ours takes one of
 * the file.
 *
 * @throws HttpProblem bad-request where the choice names a clip that is in neither, or two for one
 */
export function pairUp(file: ExportFile, ours: readonly ClipRow[], wanted: Wanted): Pair[] {
  const all = file.sessions.flatMap(({ date, clips }) => clips.map((from) => ({ from, date })));
  refuseTwice(
    all.map(({ from }) => from.id),
    'file',
    'The file has a clip twice. Export it again.',
  );
  refuseTwice(
    wanted.map(({ from }) => from),
    'pairs',
    'A clip of the file is chosen for twice. Choose once.',
  );
  const choices = new Map(wanted.map(({ from, to }) => [from, to]));
  for (const from of choices.keys())
    if (!all.some((one) => one.from.id === from))
      throw badField('pairs', 'A chosen clip is not in the file. Choose the file again.');
  const pairs = all.map(({ from, date }) => ({ from, date, ...partnerOf(from, ours, choices) }));
  refuseTwice(
    pairs.flatMap(({ to }) => (to ? [to.id] : [])),
    'pairs',
    'Two clips of the file go onto the same clip. Leave one of them out.',
  );
  return pairs;
}

function partnerOf(
  from: ExportClip,
  ours: readonly ClipRow[],
  choices: ReadonlyMap<string, string | null>,
): Pick<Pair, 'to' | 'foundBy'> {
  const choice = choices.get(from.id);
  if (choice === null) return { to: null, foundBy: null };
  if (choice !== undefined) {
    const to = ours.find(({ id }) => id === choice);
    if (!to) throw badField('pairs', 'A chosen clip is not in this session. Load the page again.');
    return { to, foundBy: 'choice' };
  }
  // The same film may be there twice: then the one that the file came from.
  const sameFilm = ours.filter(({ sha256 }) => sha256 === from.sha256);
  const to = sameFilm.find(({ id }) => id === from.id) ?? sameFilm[0] ?? null;
  return { to, foundBy: to ? 'film' : null };
}

function refuseTwice(ids: readonly string[], where: string, words: string): void {
  if (new Set(ids).size !== ids.length) throw badField(where, words);
}
