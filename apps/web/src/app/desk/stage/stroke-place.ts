import type { ArmSide } from '@stillstroke/geometry/arm';

/** A stroke as far as its events are set. */
export interface PlacedStroke {
  readonly arm: ArmSide;
  readonly entry: number;
  readonly catch: number | null;
  readonly exit: number | null;
}

/**
 * Where a frame lies in a stroke, in words: "right pull, 38 %" between catch and exit (share of the pull by time),
 * "right entry and catch" before it, "right recovery" after it. Empty outside any stroke.
 */
export function strokePlace(stroke: PlacedStroke | null, frame: number, timesUs: readonly number[]): string {
  if (!stroke) return '';
  const { arm, catch: caught, exit } = stroke;
  if (caught === null || frame < caught) return `${arm} entry and catch`;
  if (exit === null) return `${arm} pull`;
  if (frame > exit) return `${arm} recovery`;
  const [from, at, to] = [caught, frame, exit].map((event) => timesUs[event]);
  if (from === undefined || at === undefined || to === undefined || to <= from) return `${arm} pull`;
  return `${arm} pull, ${Math.round(((at - from) / (to - from)) * 100)} %`;
}
