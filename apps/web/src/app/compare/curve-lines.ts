import { ensemble, type EnsemblePoint } from '@stillstroke/geometry/curves/ensemble';
import { resample, WIDEST_GAP } from '@stillstroke/geometry/curves/resample';
import type { ComparedStroke } from './pull-stroke';

export type CurveAngle = 'forearm' | 'drop';
export type CurveStrokes = 'all' | 'breathing' | 'others';

/** A place on a curve: share of the pull 0–1, degrees. */
export interface CurvePlace {
  readonly share: number;
  readonly deg: number;
}

/** A place on a mean with its spread: standard deviation in degrees, null where one stroke has none. */
export interface MeanPlace extends CurvePlace {
  readonly sd: number;
}

/** The strokes of one arm over the pull, and what they have in common. */
export interface ArmLines {
  readonly arm: 'left' | 'right';
  readonly strokes: readonly {
    readonly stroke: ComparedStroke;
    readonly runs: readonly (readonly CurvePlace[])[];
  }[];
  /** Mean and spread at every percent that at least two strokes support, in runs without a gap. */
  readonly mean: readonly (readonly MeanPlace[])[];
  /** At every percent 0…100. */
  readonly percents: readonly EnsemblePoint[];
}

/** Strokes needed for a mean and its spread. */
const FEWEST_FOR_MEAN = 2;

/** The marks of a stroke's curve for one angle. */
export function marksOf(stroke: ComparedStroke, angle: CurveAngle): ComparedStroke['forearmCurve'] {
  return angle === 'forearm' ? stroke.forearmCurve : stroke.dropCurve;
}

export function strokesOfKind(
  strokes: readonly ComparedStroke[],
  kind: CurveStrokes,
): readonly ComparedStroke[] {
  return kind === 'all' ? strokes : strokes.filter(({ breath }) => breath === (kind === 'breathing'));
}

/** One arm's curves: straight between neighbouring marks that are near enough, nothing before the first or after the last. */
export function armLines(
  strokes: readonly ComparedStroke[],
  arm: 'left' | 'right',
  angle: CurveAngle,
): ArmLines {
  const own = strokes.filter((stroke) => stroke.arm === arm);
  const percents = ensemble(own.map((stroke) => resample(marksOf(stroke, angle))));
  return {
    arm,
    strokes: own.map((stroke) => ({ stroke, runs: runsOf(marksOf(stroke, angle)) })),
    mean: meanRuns(percents),
    percents,
  };
}

function runsOf(marks: readonly CurvePlace[]): CurvePlace[][] {
  const runs: CurvePlace[][] = [];
  for (const mark of marks) {
    const last = runs.at(-1);
    const before = last?.at(-1);
    if (last && before && mark.share - before.share <= WIDEST_GAP) last.push(mark);
    else runs.push([mark]);
  }
  return runs;
}

function meanRuns(percents: readonly EnsemblePoint[]): MeanPlace[][] {
  const runs: MeanPlace[][] = [];
  let open = false;
  for (const [percent, { count, mean, sd }] of percents.entries()) {
    if (count < FEWEST_FOR_MEAN || mean === null || sd === null) {
      open = false;
      continue;
    }
    const place = { share: percent / 100, deg: mean, sd };
    if (open) runs.at(-1)?.push(place);
    else runs.push([place]);
    open = true;
  }
  return runs;
}
