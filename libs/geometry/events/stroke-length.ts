import { type Outcome, ok, refused } from '../outcome';
import { propagate, type UncertainInput } from '../uncertainty/propagate';

/** A number with its standard uncertainty. */
export interface Quantity {
  readonly value: number;
  readonly uncertainty: number;
}

/** What a known distance adds to the stroke rate. */
export interface StrokeLength {
  /** Metres per second. */
  readonly speed: Quantity;
  /** Metres per cycle: speed over rate. */
  readonly length: Quantity;
  /** Stroke index, speed × length, m²/s (Costill et al. 1985): compare within one stroke kind only. */
  readonly index: Quantity;
}

/**
 * Speed, stroke length and stroke index. Compute per clip or per cycle and average afterwards: the product of mean speed
 * and mean length is not the mean index.
 */
export function strokeLength(swim: {
  /** Cycles per second, world time. */
  readonly cyclesPerSecond: Quantity;
  readonly distanceM: Quantity;
  /** World seconds for the distance. */
  readonly durationS: Quantity;
}): Outcome<StrokeLength, 'not-finite' | 'not-positive'> {
  const quantities = [swim.cyclesPerSecond, swim.distanceM, swim.durationS];
  if (quantities.some(({ value, uncertainty }) => !Number.isFinite(value + uncertainty)))
    return refused('not-finite');
  if (quantities.some(({ value, uncertainty }) => value <= 0 || uncertainty < 0))
    return refused('not-positive');
  const inputs: UncertainInput[] = [
    { source: 'entry-frame', value: swim.cyclesPerSecond.value, standard: swim.cyclesPerSecond.uncertainty },
    { source: 'distance', value: swim.distanceM.value, standard: swim.distanceM.uncertainty },
    { source: 'time', value: swim.durationS.value, standard: swim.durationS.uncertainty },
  ];
  const values = inputs.map(({ value }) => value);
  const quantity = (of: (rate: number, metres: number, seconds: number) => number): Quantity => {
    const result = ([rate = NaN, metres = NaN, seconds = NaN]: readonly number[]): number =>
      of(rate, metres, seconds);
    return { value: result(values), uncertainty: propagate(inputs, result).standard };
  };
  return ok({
    speed: quantity((_, metres, seconds) => metres / seconds),
    length: quantity((rate, metres, seconds) => metres / seconds / rate),
    index: quantity((rate, metres, seconds) => (metres / seconds) ** 2 / rate),
  });
}
