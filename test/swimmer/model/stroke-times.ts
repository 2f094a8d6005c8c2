import { randomStream } from './random';
import type { PullShape, SwimmerStyle } from './style';

export type ArmSide = 'left' | 'right';

/** One arm's cycle with its exact times (seconds of the film, may lie before its start) and the shape of its pull. */
export interface ModelStroke {
  readonly arm: ArmSide;
  readonly entryS: number;
  readonly catchS: number;
  readonly exitS: number;
  readonly nextEntryS: number;
  readonly breath: boolean;
  readonly shape: PullShape;
}

/** A turn of the head to breathe: from `fromS` to `toS`, mouth clear of the water around the middle. */
export interface Breath {
  readonly side: ArmSide;
  readonly fromS: number;
  readonly toS: number;
}

export interface StrokePlan {
  readonly strokes: Readonly<Record<ArmSide, readonly ModelStroke[]>>;
  readonly breaths: readonly Breath[];
}

/** Cycles planned before the film begins, so that its first frame is in full swim. */
const RUN_UP_CYCLES = 2;
/** Share of a cycle from an arm's entry to the middle of a breath to its side. */
const BREATH_AT = 0.74;
const BREATH_HALF_LENGTH = 0.27;

/**
 * Lays out all strokes of both arms that a film of `durationS` needs. The left hand's first entry in the film is at
 * `firstEntryS`; the right arm follows half a cycle later.
 */
export function planStrokes(style: SwimmerStyle, durationS: number, firstEntryS: number): StrokePlan {
  const random = randomStream(style.seed);
  const cycles = Math.ceil(durationS / style.periodS) + 2 * RUN_UP_CYCLES + 2;
  const starts: number[] = [firstEntryS - RUN_UP_CYCLES * style.periodS];
  for (let cycle = 1; cycle <= cycles; cycle += 1) {
    const length = style.periodS * (1 + (cycle <= RUN_UP_CYCLES ? 0 : random.normal(style.spread.period)));
    starts.push((starts[cycle - 1] ?? 0) + length);
  }
  const middles = starts.slice(1).map((next, cycle) => {
    const from = starts[cycle] ?? 0;
    return from + (next - from) * (0.5 + random.normal(style.spread.events));
  });
  const entries: Record<ArmSide, readonly number[]> = { left: starts, right: middles };
  const breaths = planBreaths(style, entries[style.breathing.side]);
  const strokesOf = (arm: ArmSide): ModelStroke[] =>
    entries[arm].slice(1).map((nextEntryS, cycle) => {
      const entryS = entries[arm][cycle] ?? 0;
      const length = nextEntryS - entryS;
      const breath = breaths.some(({ fromS, toS }) => {
        const middle = (fromS + toS) / 2;
        return middle >= entryS && middle < nextEntryS;
      });
      const at = (share: number): number => entryS + length * (share + random.normal(style.spread.events));
      const shape = style.arms[arm][breath ? 'breathing' : 'plain'];
      const verticalAt = shape.verticalAt + random.normal(style.spread.verticalAt);
      const shift = random.normal(style.spread.dropDeg);
      return {
        arm,
        entryS,
        catchS: at(style.catchShare),
        exitS: at(style.exitShare),
        nextEntryS,
        breath,
        shape: { ...shape, verticalAt, dropDeg: shifted(shape.dropDeg, shift) },
      };
    });
  return { strokes: { left: strokesOf('left'), right: strokesOf('right') }, breaths };
}

/** The drop shifted in the middle of the pull; its ends stay, so that the hand enters and leaves where it should. */
function shifted(drop: PullShape['dropDeg'], by: number): PullShape['dropDeg'] {
  const [start, first, second, third, fourth, end] = drop;
  return [start, first + by, second + by, third + by, fourth + by / 2, end];
}

function planBreaths({ breathing, periodS }: SwimmerStyle, entries: readonly number[]): Breath[] {
  if (breathing.every === 0) return [];
  return entries.flatMap((entryS, cycle) => {
    const counted = cycle - RUN_UP_CYCLES - breathing.first;
    if (((counted % breathing.every) + breathing.every) % breathing.every !== 0) return [];
    const middle = entryS + BREATH_AT * periodS;
    const half = BREATH_HALF_LENGTH * periodS;
    return [{ side: breathing.side, fromS: middle - half, toS: middle + half }];
  });
}
