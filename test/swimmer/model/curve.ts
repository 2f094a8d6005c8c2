/** A point that a curve goes through. `slope` (per unit of `at`) is chosen without overshoot where it is not given. */
export interface Key {
  readonly at: number;
  readonly value: number;
  readonly slope?: number;
}

export type Curve = (at: number) => number;

/**
 * Piecewise cubic through keys in rising order, with a continuous first derivative. Between keys without a given slope it
 * stays within their values (weighted harmonic mean of the neighbouring slopes, zero at an extreme); constant outside.
 */
export function curveThrough(keys: readonly Key[]): Curve {
  const slopes = keys.map((key, index) => key.slope ?? gentleSlope(keys, index));
  return (at) => {
    const first = keys[0];
    const last = keys[keys.length - 1];
    if (!first || !last) throw new RangeError('A curve needs at least one key.');
    if (at <= first.at) return first.value;
    if (at >= last.at) return last.value;
    let index = 0;
    while ((keys[index + 1]?.at ?? Infinity) <= at) index += 1;
    return between(
      keys[index] ?? first,
      slopes[index] ?? 0,
      keys[index + 1] ?? last,
      slopes[index + 1] ?? 0,
      at,
    );
  };
}

/** Derivative of a curve, by central difference over 2 µ units of `at`. */
export function slopeOf(curve: Curve, at: number, step = 1e-6): number {
  return (curve(at + step) - curve(at - step)) / (2 * step);
}

function gentleSlope(keys: readonly Key[], index: number): number {
  const before = keys[index - 1];
  const here = keys[index];
  const after = keys[index + 1];
  if (!before || !here || !after) return 0;
  const left = (here.value - before.value) / (here.at - before.at);
  const right = (after.value - here.value) / (after.at - here.at);
  if (left * right <= 0) return 0;
  const weightLeft = 2 * (after.at - here.at) + (here.at - before.at);
  const weightRight = after.at - here.at + 2 * (here.at - before.at);
  return (weightLeft + weightRight) / (weightLeft / left + weightRight / right);
}

function between(from: Key, fromSlope: number, to: Key, toSlope: number, at: number): number {
  const span = to.at - from.at;
  const s = (at - from.at) / span;
  const s2 = s * s;
  const s3 = s2 * s;
  return (
    from.value * (2 * s3 - 3 * s2 + 1) +
    fromSlope * span * (s3 - 2 * s2 + s) +
    to.value * (3 * s2 - 2 * s3) +
    toSlope * span * (s3 - s2)
  );
}
