import type { StillLayout } from '@stillstroke/contract/stills';

export interface PictureSize {
  readonly width: number;
  readonly height: number;
}

/** Where one frame lies on a still: pixels of the still, and how much larger than its own size it is. */
export interface StillPlace {
  readonly left: number;
  readonly top: number;
  readonly scale: number;
  readonly width: number;
  readonly height: number;
}

export interface StillPlan extends PictureSize {
  readonly places: readonly StillPlace[];
}

/** Two frames of 4K beside each other; a larger still is made smaller as a whole. */
const MOST_PIXELS = 2 * 4096 * 2304;
/** Between two frames, share of their height. */
const GAP = 0.012;

/** One frame in its own size; of two the smaller is enlarged to the height of the other, and they stand side by side. */
export function planStill(frames: readonly PictureSize[]): StillPlan {
  const tallest = Math.max(...frames.map(({ height }) => height));
  const gap = frames.length > 1 ? Math.round(tallest * GAP) : 0;
  const full = frames.map(({ width, height }) => Math.round((width * tallest) / height));
  const across = full.reduce((sum, width) => sum + width, 0) + gap * (frames.length - 1);
  const shrink = Math.min(1, Math.sqrt(MOST_PIXELS / (across * tallest)));
  const height = Math.floor(tallest * shrink);
  let left = 0;
  const places = frames.map((frame, at): StillPlace => {
    const width = Math.round((full[at] ?? 0) * shrink);
    const place = { left, top: 0, scale: height / frame.height, width, height };
    left += width + Math.round(gap * shrink);
    return place;
  });
  const last = places.at(-1);
  return { width: last ? last.left + last.width : 0, height, places };
}

/** Width of a thin line on a still, so that it is as strong on a phone whatever the size of the film, pairs included. */
export function lineUnit({ width, height }: PictureSize): number {
  return Math.max(1, height / 540, width / 960);
}

/** What stands over the frames of a pair. */
export function partLabels(layout: StillLayout, dates: readonly string[]): readonly (string | null)[] {
  switch (layout) {
    case 'single':
      return [null];
    case 'left-right':
      return ['Left', 'Right'];
    case 'then-now':
      return [`Then, ${dates[0] ?? ''}`, `Now, ${dates[1] ?? ''}`];
    case 'breathing-other':
      return ['With a breath', 'Without'];
  }
}
