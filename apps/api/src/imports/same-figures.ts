import type { ExportClip } from '@stillstroke/contract/export';

/**
 * How many figures of a file come out exactly the same on the clip as it is now, and how many do not: readings of every
 * mark and measures of every stroke. They differ when formulas, the coach's known spread or frame times are others than
 * where the file was made. Measures that only one of the two knows are not counted.
 */
export function sameFigures(file: ExportClip, now: ExportClip): { same: number; different: number } {
  const pairs = [...readingPairs(file, now), ...measurePairs(file, now)];
  const same = pairs.filter(([was, is]) => was === is).length;
  return { same, different: pairs.length - same };
}

type Pair = readonly [was: number | null, is: number | null | undefined];

function readingPairs(file: ExportClip, now: ExportClip): Pair[] {
  const here = new Map(now.marks.map((mark) => [`${mark.arm} ${mark.frame}`, mark]));
  return file.marks.flatMap((mark) => {
    const is = here.get(`${mark.arm} ${mark.frame}`);
    return [...numberPairs(mark.angles, is?.angles), ...numberPairs(mark.uncertaintyDeg, is?.uncertaintyDeg)];
  });
}

function numberPairs(was: Readonly<Record<string, number>>, is?: Readonly<Record<string, number>>): Pair[] {
  return Object.entries(was).map(([name, value]) => [value, is?.[name]] as const);
}

function measurePairs(file: ExportClip, now: ExportClip): Pair[] {
  const here = new Map(now.strokes.map((stroke) => [`${stroke.arm} ${stroke.entry}`, stroke]));
  return file.strokes.flatMap((stroke) => {
    const is = here.get(`${stroke.arm} ${stroke.entry}`);
    return Object.entries(stroke.figures).flatMap(([name, figure]): Pair[] => {
      const ours = is?.figures[name];
      if (is && !ours) return [];
      return [
        [figure.value, ours?.value],
        [figure.uncertainty, ours?.uncertainty],
      ];
    });
  });
}
