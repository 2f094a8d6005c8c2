import { type Outcome, ok, refused } from '../outcome';
import { checkPoint, type VideoPoint } from '../points/video-point';
import { leastSquares } from './linear-solve';

/** A point on a plane in the world, metres. */
export interface PlanePoint {
  readonly x: number;
  readonly y: number;
}

/** Row by row, last entry 1 where it can be. */
export type Matrix3 = readonly [number, number, number, number, number, number, number, number, number];

export interface PointPair {
  readonly picture: VideoPoint;
  readonly plane: PlanePoint;
}

/** Mapping between the picture and one plane in the world. Holds for points of that plane only. */
export interface Homography {
  readonly toPlane: Matrix3;
  readonly toPicture: Matrix3;
  /** Distance on the plane (metres) between each given point and where the mapping puts it. */
  readonly residualsM: readonly number[];
  /** Root mean square of them; null for four points, whose residual is always 0 and says nothing about accuracy. */
  readonly rmsM: number | null;
}

export type HomographyReason = 'not-finite' | 'too-few-points' | 'points-in-line';

/**
 * Picture ↔ plane from four or more points of which no three that matter lie in one line: direct linear transform on
 * coordinates centred and scaled to mean distance √2 (Hartley and Zisserman, ch. 4; from memory), least squares.
 */
export function homography(pairs: readonly PointPair[]): Outcome<Homography, HomographyReason> {
  if (pairs.length < 4) return refused('too-few-points');
  const usable = pairs.every(({ picture, plane }) => checkPoint(picture).ok && checkPoint(plane).ok);
  if (!usable) return refused('not-finite');
  const from = normaliser(pairs.map(({ picture }) => picture));
  const to = normaliser(pairs.map(({ plane }) => plane));
  if (!from || !to) return refused('points-in-line');
  const rows: number[][] = [];
  const right: number[] = [];
  for (const { picture, plane } of pairs) {
    const { x, y } = transform(from, picture);
    const { x: u, y: v } = transform(to, plane);
    rows.push([x, y, 1, 0, 0, 0, -x * u, -y * u], [0, 0, 0, x, y, 1, -x * v, -y * v]);
    right.push(u, v);
  }
  const solved = leastSquares(rows, right);
  if (!solved.ok) return refused('points-in-line');
  const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0] = solved.value;
  const toUnits = inverse(to);
  const toPlane = toUnits && scaled(multiply(multiply(toUnits, [a, b, c, d, e, f, g, h, 1]), from));
  const back = toPlane && inverse(toPlane);
  if (!toPlane || !back) return refused('points-in-line');
  const residualsM = pairs.map(({ picture, plane }) => {
    const seen = transform(toPlane, picture);
    return Math.hypot(seen.x - plane.x, seen.y - plane.y);
  });
  const rms = Math.sqrt(residualsM.reduce((sum, r) => sum + r * r, 0) / pairs.length);
  return ok({ toPlane, toPicture: scaled(back), residualsM, rmsM: pairs.length > 4 ? rms : null });
}

/** A point through a mapping; null for a point that it sends to infinity. */
export function mapPoint(matrix: Matrix3, point: PlanePoint): PlanePoint | null {
  const mapped = transform(matrix, point);
  return Number.isFinite(mapped.x) && Number.isFinite(mapped.y) ? mapped : null;
}

/**
 * How plane coordinates change per pixel at a picture point: [∂X/∂x, ∂X/∂y, ∂Y/∂x, ∂Y/∂y], metres per pixel. The scale
 * of a plane seen at an angle differs from place to place.
 */
export function localScale(matrix: Matrix3, at: VideoPoint): readonly [number, number, number, number] {
  const [a, b, , d, e, , g, h] = matrix;
  const { x, y } = transform(matrix, at);
  const w = matrix[6] * at.x + matrix[7] * at.y + matrix[8];
  return [(a - x * g) / w, (b - x * h) / w, (d - y * g) / w, (e - y * h) / w];
}

function transform(m: Matrix3, { x, y }: PlanePoint): PlanePoint {
  const w = m[6] * x + m[7] * y + m[8];
  return { x: (m[0] * x + m[1] * y + m[2]) / w, y: (m[3] * x + m[4] * y + m[5]) / w };
}

/** Moves points about their centre, at mean distance √2 from it; null when they are all one point. */
function normaliser(points: readonly PlanePoint[]): Matrix3 | null {
  const mean = (of: (point: PlanePoint) => number): number =>
    points.reduce((sum, p) => sum + of(p), 0) / points.length;
  const cx = mean(({ x }) => x);
  const cy = mean(({ y }) => y);
  const away = mean(({ x, y }) => Math.hypot(x - cx, y - cy));
  if (!(away > 0)) return null;
  const k = Math.SQRT2 / away;
  return [k, 0, -k * cx, 0, k, -k * cy, 0, 0, 1];
}

function multiply(p: Matrix3, q: Matrix3): Matrix3 {
  const at = (row: number, column: number): number =>
    [0, 1, 2].reduce((sum, k) => sum + (p[3 * row + k] ?? 0) * (q[3 * k + column] ?? 0), 0);
  return [at(0, 0), at(0, 1), at(0, 2), at(1, 0), at(1, 1), at(1, 2), at(2, 0), at(2, 1), at(2, 2)];
}

function inverse([a, b, c, d, e, f, g, h, i]: Matrix3): Matrix3 | null {
  const [A, B, C] = [e * i - f * h, f * g - d * i, d * h - e * g];
  const determinant = a * A + b * B + c * C;
  if (determinant === 0 || !Number.isFinite(determinant)) return null;
  const rows = [
    A,
    c * h - b * i,
    b * f - c * e,
    B,
    a * i - c * g,
    c * d - a * f,
    C,
    b * g - a * h,
    a * e - b * d,
  ];
  const [m0 = 0, m1 = 0, m2 = 0, m3 = 0, m4 = 0, m5 = 0, m6 = 0, m7 = 0, m8 = 0] = rows.map(
    (v) => v / determinant,
  );
  return [m0, m1, m2, m3, m4, m5, m6, m7, m8];
}

/** The same mapping with its last entry 1, unless that is 0. */
function scaled(m: Matrix3): Matrix3 {
  const last = m[8];
  if (last === 0) return m;
  const [m0, m1, m2, m3, m4, m5, m6, m7] = m;
  return [m0 / last, m1 / last, m2 / last, m3 / last, m4 / last, m5 / last, m6 / last, m7 / last, 1];
}
