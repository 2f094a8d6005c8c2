import type { Stroke } from '@stillstroke/contract/strokes';
import type { Db } from '@stillstroke/db/open';
import { strokes } from '@stillstroke/db/schema/film';
import { checkOrder, type OrderReason, type StrokeEvents } from '@stillstroke/geometry/events/stroke';
import { and, eq, ne } from 'drizzle-orm';
import { HttpProblem } from '../platform/problem';

/** @throws HttpProblem frame-out-of-range or events-out-of-order, in words that say which event to move */
export function checkEvents(events: StrokeEvents, frameCount: number): void {
  const order = checkOrder(events, frameCount);
  if (order.ok) return;
  if (order.reason === 'frame-outside-clip' || order.reason === 'frame-not-whole') {
    throw new HttpProblem(
      422,
      'frame-out-of-range',
      `The clip has frames 0 to ${frameCount - 1}; an event lies outside.`,
    );
  }
  throw new HttpProblem(422, 'events-out-of-order', orderWords[order.reason]);
}

const orderWords: Record<Exclude<OrderReason, 'frame-outside-clip' | 'frame-not-whole'>, string> = {
  'catch-not-after-entry': 'The catch has to come after the entry. Move one of the two.',
  'exit-not-after-catch': 'The exit has to come after the catch. Move one of the two.',
  'next-entry-not-after-exit': 'The next entry has to come after the exit. Move one of the two.',
};

/**
 * One arm does one stroke at a time: from entry to next entry (to the exit while that is not known) no other stroke of
 * the same arm. The next entry of one may be the entry of the following.
 *
 * @throws HttpProblem strokes-overlap that names the frames of the other
 */
export function checkNoOverlap(
  db: Pick<Db, 'select'>,
  stroke: Pick<Stroke, 'id' | 'clipId' | 'arm' | 'entry' | 'exit' | 'nextEntry'>,
): void {
  const others = db
    .select()
    .from(strokes)
    .where(and(eq(strokes.clipId, stroke.clipId), eq(strokes.arm, stroke.arm), ne(strokes.id, stroke.id)))
    .all();
  const end = stroke.nextEntry ?? stroke.exit;
  const other = others.find(({ entryFrame, exitFrame, nextEntryFrame }) => {
    const otherEnd = nextEntryFrame ?? exitFrame;
    return stroke.entry < otherEnd && entryFrame < end;
  });
  if (!other) return;
  throw new HttpProblem(
    409,
    'strokes-overlap',
    `Another stroke of the ${stroke.arm} arm goes from frame ${other.entryFrame} to ${other.nextEntryFrame ?? other.exitFrame}. Change that one, or move this one's events.`,
    { current: { strokeId: other.id } },
  );
}
