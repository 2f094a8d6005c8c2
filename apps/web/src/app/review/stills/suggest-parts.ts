import type { StillLayout, StillPart } from '@stillstroke/contract/stills';
import type { ShelfClip, ShelfStroke } from './film-shelf';

interface Suggestion {
  readonly here: StillPart;
  readonly clips: readonly ShelfClip[];
  readonly strokesOf: (clipId: string) => Promise<readonly ShelfStroke[]>;
}

/** Two frames to begin a pair with: the catches of two strokes that the pair is about, as far as there are such. */
export async function suggestParts(layout: StillLayout, wish: Suggestion): Promise<readonly StillPart[]> {
  const { here } = wish;
  switch (layout) {
    case 'single':
      return [here];
    case 'left-right':
      return pairOf(
        wish,
        ({ arm }) => arm === 'left',
        ({ arm }) => arm === 'right',
      );
    case 'breathing-other':
      return pairOf(
        wish,
        ({ breath }) => breath,
        ({ breath }) => !breath,
      );
    case 'then-now':
      return thenAndNow(wish);
  }
}

async function pairOf(
  { here, strokesOf }: Suggestion,
  first: (stroke: ShelfStroke) => boolean,
  second: (stroke: ShelfStroke) => boolean,
): Promise<readonly StillPart[]> {
  const strokes = await strokesOf(here.clipId);
  const catchOf = (which: (stroke: ShelfStroke) => boolean) => ({
    clipId: here.clipId,
    frame: strokes.find(which)?.catch ?? here.frame,
  });
  return [catchOf(first), catchOf(second)];
}

/** Of the newest clip of an earlier session with the same view; the same arm at its first catch. */
async function thenAndNow({ here, clips, strokesOf }: Suggestion): Promise<readonly StillPart[]> {
  const now = clips.find(({ clip }) => clip.id === here.clipId);
  const then = clips.find(
    ({ clip, date }) =>
      now && date < now.date && clip.view === now.clip.view && clip.stroke === now.clip.stroke,
  );
  if (!then) return [here, here];
  const arm = (await strokesOf(here.clipId)).find(
    (stroke) => stroke.entry <= here.frame && here.frame <= (stroke.nextEntry ?? stroke.exit),
  )?.arm;
  const earlier = await strokesOf(then.clip.id);
  const stroke = earlier.find((one) => one.arm === arm) ?? earlier[0];
  return [{ clipId: then.clip.id, frame: stroke?.catch ?? 0 }, here];
}
