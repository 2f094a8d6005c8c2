import type { Point } from '@stillstroke/contract/clip-facts';
import type { KnownLength, Scale } from '@stillstroke/contract/scale';

/** A point of the scale, of its second known length, or of the measuring line. */
export type ScalePointName =
  | 'from'
  | 'to'
  | 'corner-0'
  | 'corner-1'
  | 'corner-2'
  | 'corner-3'
  | 'check-from'
  | 'check-to'
  | 'line-from'
  | 'line-to';

export interface ScalePoint {
  readonly name: ScalePointName;
  /** `First end of the known length` */
  readonly label: string;
  readonly point: Point;
}

/** Two places between which a distance is read. */
export interface MeasuringLine {
  readonly from: Point;
  readonly to: Point;
}

/** Every point of a scale in the order in which it is walked through. */
export function scalePoints(scale: Scale | null): readonly ScalePoint[] {
  if (!scale) return [];
  const own: ScalePoint[] =
    scale.kind === 'length'
      ? [
          { name: 'from', label: 'First end of the known length', point: scale.from },
          { name: 'to', label: 'Second end of the known length', point: scale.to },
        ]
      : scale.corners.map((point, at) => ({
          name: `corner-${at}` as ScalePointName,
          label: `Corner ${at + 1} of the rectangle`,
          point,
        }));
  if (!scale.check) return own;
  const { from, to } = scale.check;
  return [
    ...own,
    { name: 'check-from', label: 'First end of the second length', point: from },
    { name: 'check-to', label: 'Second end of the second length', point: to },
  ];
}

export function linePoints(line: MeasuringLine | null): readonly ScalePoint[] {
  if (!line) return [];
  return [
    { name: 'line-from', label: 'First end of the measuring line', point: line.from },
    { name: 'line-to', label: 'Second end of the measuring line', point: line.to },
  ];
}

/** The scale with one of its points elsewhere; the same when it has no such point. */
export function withPoint(scale: Scale, name: ScalePointName, point: Point): Scale {
  if (name === 'check-from' || name === 'check-to') {
    const end = name === 'check-from' ? 'from' : 'to';
    return scale.check ? { ...scale, check: { ...scale.check, [end]: point } } : scale;
  }
  if (scale.kind === 'length') {
    return name === 'from' || name === 'to' ? { ...scale, [name]: point } : scale;
  }
  const [a, b, c, d] = scale.corners;
  const at = (index: number, old: Point) => (name === `corner-${index}` ? point : old);
  return { ...scale, corners: [at(0, a), at(1, b), at(2, c), at(3, d)] };
}

interface Size {
  readonly width: number;
  readonly height: number;
}

/** Where a known length begins before it is placed: across the middle of the picture. */
export function lengthIn({ width, height }: Size): Scale {
  const y = Math.round(height * 0.5);
  return {
    kind: 'length',
    plane: 'swimmer',
    from: { x: Math.round(width * 0.35), y },
    to: { x: Math.round(width * 0.65), y },
    metres: 1,
    uncertaintyM: 0,
    check: null,
  };
}

export function rectangleIn({ width, height }: Size): Scale {
  const [left, right] = [Math.round(width * 0.35), Math.round(width * 0.65)];
  const [top, bottom] = [Math.round(height * 0.35), Math.round(height * 0.65)];
  return {
    kind: 'rectangle',
    plane: 'wall',
    corners: [
      { x: left, y: top },
      { x: right, y: top },
      { x: right, y: bottom },
      { x: left, y: bottom },
    ],
    widthM: 1,
    heightM: 1,
    uncertaintyM: 0,
    check: null,
  };
}

export function checkIn({ width, height }: Size): KnownLength {
  const y = Math.round(height * 0.25);
  return { from: { x: Math.round(width * 0.4), y }, to: { x: Math.round(width * 0.6), y }, metres: 1 };
}

export function lineIn({ width, height }: Size): MeasuringLine {
  const y = Math.round(height * 0.75);
  return { from: { x: Math.round(width * 0.4), y }, to: { x: Math.round(width * 0.6), y } };
}
