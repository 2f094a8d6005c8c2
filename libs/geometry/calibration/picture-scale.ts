import { type Outcome, ok, refused } from '../outcome';
import { checkPoint, distance, type VideoPoint } from '../points/video-point';
import { homography, type Matrix3 } from './homography';
import { checkQuad, type Quad, type QuadReason } from './quad';

/** The plane in which a scale holds: that of the swimmer, or one of the pool's, in which nothing of the swimmer lies. */
export type ScalePlane = 'swimmer' | 'wall' | 'floor';

/** Something of known length in the picture. */
export interface KnownLength {
  readonly from: VideoPoint;
  readonly to: VideoPoint;
  readonly metres: number;
}

/** What the scale of a clip is taken from, with how well the length itself is known. */
export type PictureScale =
  | ({ readonly kind: 'length'; readonly plane: ScalePlane; readonly uncertaintyM: number } & KnownLength)
  | {
      readonly kind: 'rectangle';
      readonly plane: ScalePlane;
      /** Walked round: the first two are the ends of a side of `widthM`, the second and third of one of `heightM`. */
      readonly corners: Quad;
      readonly widthM: number;
      readonly heightM: number;
      /** Standard uncertainty of either side, metres. */
      readonly uncertaintyM: number;
    };

export type ScaleReason =
  | 'not-finite'
  | 'outside-picture'
  | 'not-positive'
  | 'too-long'
  | 'too-short'
  | 'points-in-line'
  | QuadReason;

/** Nobody films farther. */
export const LONGEST_M = 200;
/** Points may lie this share of the picture outside it: a known thing may be cut off by its edge. */
const OUTSIDE_SHARE = 0.5;
/** A length shorter than this in the picture says too little, pixels. */
const SHORTEST_PX = 10;

export interface PictureSize {
  readonly width: number;
  readonly height: number;
}

/** The scale itself when distances can be read with it; else the first thing that is wrong with it, by name. */
export function checkScale(scale: PictureScale, picture: PictureSize): Outcome<PictureScale, ScaleReason> {
  const points = scale.kind === 'length' ? [scale.from, scale.to] : scale.corners;
  const placed = checkPlaces(points, picture);
  if (!placed.ok) return placed;
  const lengths = scale.kind === 'length' ? [scale.metres] : [scale.widthM, scale.heightM];
  const known = checkLengths(lengths, scale.uncertaintyM);
  if (!known.ok) return known;
  if (scale.kind === 'length') {
    return distance(scale.from, scale.to) < SHORTEST_PX ? refused('too-short') : ok(scale);
  }
  const quad = checkQuad(scale.corners);
  if (!quad.ok) return quad;
  return toPlane(scale) ? ok(scale) : refused('points-in-line');
}

/** The same of a second known length, which is held against the scale. */
export function checkKnown(known: KnownLength, picture: PictureSize): Outcome<KnownLength, ScaleReason> {
  const placed = checkPlaces([known.from, known.to], picture);
  if (!placed.ok) return placed;
  const length = checkLengths([known.metres], 0);
  if (!length.ok) return length;
  return distance(known.from, known.to) < SHORTEST_PX ? refused('too-short') : ok(known);
}

function checkPlaces(
  points: readonly VideoPoint[],
  { width, height }: PictureSize,
): Outcome<null, 'not-finite' | 'outside-picture'> {
  for (const point of points) {
    if (!checkPoint(point).ok) return refused('not-finite');
    const [beyondX, beyondY] = [width * OUTSIDE_SHARE, height * OUTSIDE_SHARE];
    const inside =
      point.x >= -beyondX && point.x <= width + beyondX && point.y >= -beyondY && point.y <= height + beyondY;
    if (!inside) return refused('outside-picture');
  }
  return ok(null);
}

function checkLengths(
  metres: readonly number[],
  uncertaintyM: number,
): Outcome<null, 'not-finite' | 'not-positive' | 'too-long'> {
  if (![...metres, uncertaintyM].every(Number.isFinite)) return refused('not-finite');
  if (metres.some((length) => length <= 0) || uncertaintyM < 0) return refused('not-positive');
  return metres.some((length) => length > LONGEST_M) || uncertaintyM > LONGEST_M
    ? refused('too-long')
    : ok(null);
}

/** Picture to metres on the plane; a known length gives the same scale everywhere. Null for corners that fix no plane. */
function toPlane(scale: PictureScale): Matrix3 | null {
  if (scale.kind === 'length') {
    const k = scale.metres / distance(scale.from, scale.to);
    return Number.isFinite(k) ? [k, 0, 0, 0, k, 0, 0, 0, 1] : null;
  }
  const { widthM, heightM } = scale;
  const plane = [
    { x: 0, y: 0 },
    { x: widthM, y: 0 },
    { x: widthM, y: heightM },
    { x: 0, y: heightM },
  ] as const;
  const pairs = scale.corners.map((picture, at) => ({ picture, plane: plane[at] ?? plane[0] }));
  const found = homography(pairs);
  return found.ok ? found.value.toPlane : null;
}

/** A scale made ready: its mapping, and what becomes of the mapping when one number behind it is a little off. */
export interface FittedScale {
  readonly plane: ScalePlane;
  /** A place of the picture that lies on the plane for certain. */
  readonly known: VideoPoint;
  readonly toPlane: Matrix3;
  /** One pair for each number behind it, moved up and down by {@link FIT_STEP} of its standard uncertainty. */
  readonly variants: readonly { readonly above: Matrix3; readonly below: Matrix3 }[];
}

/** Share of an uncertainty by which an input is moved to find the slope. */
export const FIT_STEP = 0.05;

/** Makes a scale ready whose points were each placed with the given standard uncertainty, pixels per coordinate. */
export function fitScale(scale: PictureScale, placingPx: number): Outcome<FittedScale, 'points-in-line'> {
  const matrix = toPlane(scale);
  if (!matrix) return refused('points-in-line');
  const variants = inputsOf(scale, placingPx).flatMap(({ standard, moved }) => {
    const [above, below] = [toPlane(moved(FIT_STEP * standard)), toPlane(moved(-FIT_STEP * standard))];
    return standard > 0 && above && below ? [{ above, below }] : [];
  });
  const known = scale.kind === 'length' ? scale.from : scale.corners[0];
  return ok({ plane: scale.plane, known, toPlane: matrix, variants });
}

interface ScaleInput {
  readonly standard: number;
  readonly moved: (by: number) => PictureScale;
}

/** Everything that a scale is made of, one number at a time. */
function inputsOf(scale: PictureScale, placingPx: number): readonly ScaleInput[] {
  const axes = ['x', 'y'] as const;
  if (scale.kind === 'length') {
    const places = (['from', 'to'] as const).flatMap((end) =>
      axes.map((axis) => ({
        standard: placingPx,
        moved: (by: number): PictureScale => ({
          ...scale,
          [end]: { ...scale[end], [axis]: scale[end][axis] + by },
        }),
      })),
    );
    const moved = (by: number): PictureScale => ({ ...scale, metres: scale.metres + by });
    return [...places, { standard: scale.uncertaintyM, moved }];
  }
  const [a, b, c, d] = scale.corners;
  const places = [0, 1, 2, 3].flatMap((corner) =>
    axes.map((axis) => ({
      standard: placingPx,
      moved: (by: number): PictureScale => {
        const shift = (point: VideoPoint, index: number): VideoPoint =>
          index === corner ? { ...point, [axis]: point[axis] + by } : point;
        return { ...scale, corners: [shift(a, 0), shift(b, 1), shift(c, 2), shift(d, 3)] };
      },
    })),
  );
  const sides = (['widthM', 'heightM'] as const).map((side) => ({
    standard: scale.uncertaintyM,
    moved: (by: number): PictureScale => ({ ...scale, [side]: scale[side] + by }),
  }));
  return [...places, ...sides];
}
