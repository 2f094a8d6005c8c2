import { type ArmSide, checkArmMark, type FrameMark } from '../arm';
import type { StrokeMeasures } from '../measures/stroke-measures';
import { cameraTilt } from './camera-tilt';
import {
  angleBehind,
  cautionOf,
  type AffectedReading,
  type CautionCode,
  cautionCodes,
  type FrameReadingName,
  type SizeByReading,
  type StrokeReadingName,
  strokeReadingNames,
  type ViewCaution,
} from './caution';
import { farArm } from './near-arm';
import { portCaution } from './port-bending';
import { foreshortened } from './segment-tilt';
import type { ViewContext } from './view-context';

/** Cautions that hold for a whole clip: its vertical. */
export function clipCautions(context: ViewContext): readonly ViewCaution[] {
  const tilt = cameraTilt(context);
  return tilt ? [tilt] : [];
}

/**
 * Cautions on the four angles of single frames, most telling first on each.
 *
 * @param seen marks of the same arm at about the same distance, among them those of `shown`, to compare lengths with
 * @param shown the marks asked about
 */
export function frameCautions(
  context: ViewContext,
  arm: ArmSide,
  seen: readonly FrameMark[],
  shown: readonly FrameMark[],
): readonly ViewCaution[] {
  const usable = shown.filter((mark) => checkArmMark(mark).ok);
  return [
    ...foreshortened(arm, seen, usable, context.jointUncertaintyPx),
    ...usable.flatMap((mark) => farArm(context, arm, mark) ?? []),
    ...usable.flatMap((mark) => portCaution(context, arm, mark) ?? []),
  ];
}

/**
 * Cautions on the measures of a stroke: what holds on the very frames that each measure was read from. One a code, with the
 * frames and the largest size for each measure.
 *
 * @param marks of the stroke's arm; lengths are compared within catch to exit
 */
export function strokeCautions(
  context: ViewContext,
  stroke: { readonly arm: ArmSide; readonly catch: number; readonly exit: number },
  marks: readonly FrameMark[],
  measures: StrokeMeasures,
): readonly ViewCaution[] {
  const pull = marks.filter(({ frame }) => frame >= stroke.catch && frame <= stroke.exit);
  const onFrames = frameCautions(context, stroke.arm, pull, pull);
  const cautions = strokeReadingNames.flatMap((measure) => {
    const read = framesRead(measures, measure);
    return onFrames
      .filter((caution) => caution.frames.some((frame) => read.includes(frame)))
      .flatMap((caution) => renamed(caution, measure) ?? []);
  });
  return cautionCodes.flatMap(
    (code) =>
      together(
        code,
        cautions.filter((caution) => caution.code === code),
      ) ?? [],
  );
}

/** The frames whose marks a measure rests on: not those that were merely looked through, nor its events. */
function framesRead(measures: StrokeMeasures, measure: StrokeReadingName): readonly number[] {
  const { verticalAt, peakDrop, elbowAtMidPull } = measures;
  switch (measure) {
    case 'verticalAt':
      return verticalAt.ok ? verticalAt.value.bracket : [];
    case 'peakDrop':
      return peakDrop.ok ? [peakDrop.value.frame] : [];
    case 'elbowAtMidPull':
      return elbowAtMidPull.ok ? elbowAtMidPull.value.frames : [];
  }
}

/** A frame's caution as one on a measure that was read there. */
function renamed(caution: ViewCaution, measure: StrokeReadingName): ViewCaution | null {
  const sizeDeg = sizeFor(caution, angleBehind[measure]);
  return sizeDeg === null ? null : cautionOf(caution, { [measure]: sizeDeg }, 0);
}

/** Cautions of one code made one: all frames, and of each reading the largest size. */
function together(code: CautionCode, cautions: readonly ViewCaution[]): ViewCaution | null {
  const [first] = cautions;
  if (!first) return null;
  const sizes: SizeByReading = {};
  for (const { reading, sizeDeg } of cautions.flatMap(({ affects }) => affects)) {
    sizes[reading] = Math.max(sizes[reading] ?? 0, sizeDeg);
  }
  const frames = [...new Set(cautions.flatMap((caution) => caution.frames))].sort((a, b) => a - b);
  const causes = cautions.flatMap(({ causeDeg }) => causeDeg ?? []);
  const causeDeg = causes.length > 0 ? Math.max(...causes) : null;
  return cautionOf({ ...first, code, frames, causeDeg }, sizes, 0);
}

/** By how much a caution says that a reading may be off; null when it does not touch it. */
export function sizeFor(
  { affects }: Pick<ViewCaution, 'affects'>,
  reading: AffectedReading | FrameReadingName,
): number | null {
  return affects.find((affected) => affected.reading === reading)?.sizeDeg ?? null;
}
