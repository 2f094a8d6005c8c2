import type { ImportClip, ImportCounts } from '@stillstroke/contract/import';

const count = (n: number, one: string, many: string) => `${n} ${n === 1 ? one : many}`;

/** `4 new, 1 different, 10 the same, 2 only here`; null where there is nothing in either. */
export function sayCounts({ new: fresh, changed, same, onlyHere }: ImportCounts): string {
  const parts = [
    fresh > 0 ? `${fresh} new` : '',
    changed > 0 ? `${changed} different` : '',
    same > 0 ? `${same} the same` : '',
    onlyHere > 0 ? `${onlyHere} only here` : '',
  ].filter(Boolean);
  return parts.join(', ') || 'none';
}

const setUpWords: Readonly<Record<string, string>> = {
  view: 'view',
  travel: 'direction of travel',
  stroke: 'kind of stroke',
  captureRateFactor: 'capture rate factor',
  plumb: 'plumb',
  distance: 'distance swum',
};

export function saySetUp(fields: readonly string[]): string {
  if (fields.length === 0) return 'the same';
  return `${fields.map((field) => setUpWords[field] ?? field).join(', ')} ${fields.length === 1 ? 'differs' : 'differ'}`;
}

/** Whether the figures come out as in the file, and if not, why that may be. */
export function sayFigures({ same, different }: ImportClip['figures']): string {
  if (same + different === 0) return 'none in the file';
  if (different === 0)
    return same === 1 ? 'the one figure comes out the same' : `all ${same} come out the same`;
  return `${different} of ${same + different} come out otherwise: the file was made with other formulas, another known spread of marks, or other frame times`;
}

/** Whether a choice between what is here and what is in the file has to be made. */
export function hasConflict({ setUp, strokes, marks }: ImportClip): boolean {
  return setUp.length > 0 || [strokes, marks].some(({ changed, onlyHere }) => changed + onlyHere > 0);
}

export function hasChange(clip: ImportClip): boolean {
  return hasConflict(clip) || clip.strokes.new + clip.marks.new > 0;
}

export function sayBroughtIn(clips: readonly ImportClip[]): string {
  const onto = clips.filter(({ to }) => to).length;
  return `Brought in onto ${count(onto, 'clip', 'clips')}.`;
}
