import type { Arm, Stroke } from '@stillstroke/contract/strokes';
import { sourceOf } from '@stillstroke/geometry/events/event-moment';
import type { EventName, EventSource, EventSources, StrokeEvents } from '@stillstroke/geometry/events/stroke';

/** A stroke as the Desk holds it: until entry, catch and exit are set it is a draft, kept on the device only. */
export interface DeskStroke extends EventSources {
  readonly id: string;
  readonly arm: Arm;
  readonly entry: number;
  readonly catch: number | null;
  readonly exit: number | null;
  readonly nextEntry: number | null;
  readonly breath: boolean;
}

export type { EventName, EventSource };
export const eventsInOrder: readonly EventName[] = ['entry', 'catch', 'exit', 'nextEntry'];
export const eventWords: Readonly<Record<EventName, string>> = {
  entry: 'entry',
  catch: 'catch',
  exit: 'exit',
  nextEntry: 'next entry',
};

/** A stroke with the events that it cannot be saved or measured without. */
export type CompleteStroke = DeskStroke & StrokeEvents;

export function isWhole(stroke: DeskStroke): stroke is CompleteStroke {
  return stroke.catch !== null && stroke.exit !== null;
}

export function deskStrokeOf({ clipId: _, version: __, ...stroke }: Stroke): DeskStroke {
  return stroke;
}

/** What each event was chosen by, in full: changes kept on the device from before may not say. */
export function sourcesOf(stroke: DeskStroke): Required<EventSources> {
  return {
    entrySource: sourceOf(stroke, 'entry'),
    catchSource: sourceOf(stroke, 'catch'),
    exitSource: sourceOf(stroke, 'exit'),
    nextEntrySource: sourceOf(stroke, 'nextEntry'),
  };
}

/** By entry, earliest first. */
export function strokesOf(strokes: readonly DeskStroke[], arm: Arm): readonly DeskStroke[] {
  return strokes.filter((stroke) => stroke.arm === arm).sort((a, b) => a.entry - b.entry);
}

/** The last frame that is known to belong to a stroke. */
export function lastFrameOf({ entry, catch: caught, exit, nextEntry }: DeskStroke): number {
  return nextEntry ?? exit ?? caught ?? entry;
}

/**
 * The stroke that a frame of an arm lies in: the latest that began by then, unless it ended before the frame. One whose
 * next entry is not known goes on until the arm's next stroke begins.
 */
export function strokeAt(strokes: readonly DeskStroke[], arm: Arm, frame: number): DeskStroke | null {
  const begun = strokesOf(strokes, arm).filter(({ entry }) => entry <= frame);
  const latest = begun.at(-1) ?? null;
  return latest && frame > (latest.nextEntry ?? Infinity) ? null : latest;
}

export function sameStroke(a: DeskStroke | null, b: DeskStroke | null): boolean {
  if (a === null || b === null) return a === b;
  return (
    a.id === b.id &&
    eventsInOrder.every((event) => a[event] === b[event] && sourceOf(a, event) === sourceOf(b, event)) &&
    a.breath === b.breath
  );
}

const ordinals = [
  'First',
  'Second',
  'Third',
  'Fourth',
  'Fifth',
  'Sixth',
  'Seventh',
  'Eighth',
  'Ninth',
  'Tenth',
];

/** `Second right stroke`, counted along the clip; `Right stroke 11` from the eleventh on. */
export function nameStroke(strokes: readonly DeskStroke[], stroke: DeskStroke): string {
  const place = strokesOf(strokes, stroke.arm).findIndex(({ id }) => id === stroke.id);
  const ordinal = ordinals[place];
  if (ordinal) return `${ordinal} ${stroke.arm} stroke`;
  return `${stroke.arm === 'left' ? 'Left' : 'Right'} stroke ${place + 1}`;
}
