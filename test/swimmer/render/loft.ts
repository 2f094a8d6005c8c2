import type { Colour } from './look';

export type Vector = readonly [number, number, number];

/** What the body shader does with a surface. */
export const MATERIAL = { plain: 0, torso: 1, leg: 2, head: 3 } as const;

/** An oval slice of a limb or the trunk: centre, two half axes as vectors, colour, and coordinates of its own. */
export interface Slice {
  readonly centre: Vector;
  readonly across: Vector;
  readonly over: Vector;
  /** Place along the part, metres: what the shader lays suit and cap out by. */
  readonly place: number;
}

export interface Surface {
  readonly material: number;
  readonly colour: Colour;
}

/** Floats per vertex: place 3, normal 3, colour 3, material 1, local 3. */
export const VERTEX_FLOATS = 13;

export class Mesh {
  readonly vertices: number[] = [];
  readonly triangles: number[] = [];

  /** A closed skin over slices, `around` corners each. */
  loft(slices: readonly Slice[], surface: Surface, around = 18): void {
    const points = slices.map((slice) => ring(slice, around));
    const base = this.vertices.length / VERTEX_FLOATS;
    for (const [index, slice] of slices.entries()) {
      for (let corner = 0; corner < around; corner += 1) {
        const angle = (2 * Math.PI * corner) / around;
        const normal = normalAt(points, index, corner, around, slice.centre);
        const local: Vector = [slice.place, Math.sin(angle), Math.cos(angle)];
        this.vertex(points[index]?.[corner] ?? slice.centre, normal, surface, local);
      }
    }
    for (let index = 0; index + 1 < slices.length; index += 1) {
      for (let corner = 0; corner < around; corner += 1) {
        const next = (corner + 1) % around;
        const here = base + index * around;
        const there = here + around;
        this.triangles.push(
          here + corner,
          there + corner,
          here + next,
          here + next,
          there + corner,
          there + next,
        );
      }
    }
  }

  /** An ellipsoid with three half axes; its local coordinates are the unit vector along them. */
  ellipsoid(
    centre: Vector,
    axes: readonly [Vector, Vector, Vector],
    surface: Surface,
    rings = 18,
    around = 24,
  ): void {
    const base = this.vertices.length / VERTEX_FLOATS;
    for (let ringAt = 0; ringAt <= rings; ringAt += 1) {
      const tilt = Math.PI * (ringAt / rings - 0.5);
      for (let corner = 0; corner < around; corner += 1) {
        const turn = (2 * Math.PI * corner) / around;
        const unit: Vector = [
          Math.sin(tilt),
          Math.cos(tilt) * Math.cos(turn),
          Math.cos(tilt) * Math.sin(turn),
        ];
        const offset = blend(axes, unit);
        const flat: Vector = [
          unit[0] / dot(axes[0], axes[0]),
          unit[1] / dot(axes[1], axes[1]),
          unit[2] / dot(axes[2], axes[2]),
        ];
        this.vertex(plus(centre, offset), unitVector(blend(axes, flat)), surface, unit);
      }
    }
    for (let ringAt = 0; ringAt < rings; ringAt += 1) {
      for (let corner = 0; corner < around; corner += 1) {
        const next = (corner + 1) % around;
        const here = base + ringAt * around;
        const there = here + around;
        this.triangles.push(
          here + corner,
          there + corner,
          here + next,
          here + next,
          there + corner,
          there + next,
        );
      }
    }
  }

  private vertex(place: Vector, normal: Vector, surface: Surface, local: Vector): void {
    this.vertices.push(...place, ...normal, ...surface.colour, surface.material, ...local);
  }
}

function ring(slice: Slice, around: number): Vector[] {
  return Array.from({ length: around }, (_, corner) => {
    const angle = (2 * Math.PI * corner) / around;
    return plus(slice.centre, plus(times(slice.across, Math.sin(angle)), times(slice.over, Math.cos(angle))));
  });
}

function normalAt(
  points: readonly Vector[][],
  index: number,
  corner: number,
  around: number,
  centre: Vector,
): Vector {
  const at = (ringAt: number, cornerAt: number): Vector =>
    points[Math.max(0, Math.min(points.length - 1, ringAt))]?.[(cornerAt + around) % around] ?? centre;
  const alongPart = minus(at(index + 1, corner), at(index - 1, corner));
  const aroundPart = minus(at(index, corner + 1), at(index, corner - 1));
  const normal = unitVector(cross(alongPart, aroundPart));
  return dot(normal, minus(at(index, corner), centre)) < 0 ? times(normal, -1) : normal;
}

function blend(axes: readonly [Vector, Vector, Vector], by: Vector): Vector {
  return plus(times(axes[0], by[0]), plus(times(axes[1], by[1]), times(axes[2], by[2])));
}

export function plus(a: Vector, b: Vector): Vector {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
}

export function minus(a: Vector, b: Vector): Vector {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

export function times(a: Vector, by: number): Vector {
  return [a[0] * by, a[1] * by, a[2] * by];
}

export function dot(a: Vector, b: Vector): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cross(a: Vector, b: Vector): Vector {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function unitVector(a: Vector): Vector {
  const length = Math.sqrt(dot(a, a)) || 1;
  return times(a, 1 / length);
}
