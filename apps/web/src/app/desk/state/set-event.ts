import { ok, refused, type Outcome } from '@stillstroke/geometry/outcome';
import type { Arm } from '@stillstroke/contract/strokes';
import {
  eventsInOrder,
  eventWords,
  lastFrameOf,
  strokesOf,
  type DeskStroke,
  type EventName,
} from './desk-stroke';

/** Strokes that a command changes, with what they become; `before` null for one that begins. */
export interface StrokeEdit {
  readonly before: DeskStroke | null;
  readonly after: DeskStroke;
}

/** What to change, or a sentence that says what to do instead. */
export type EventOutcome = Outcome<readonly StrokeEdit[], string>;

/**
 * An event key pressed on a frame: finds out which stroke of the arm it is meant for.
 *
 * - entry: begins a stroke, and is the next entry of the one before; between entry and catch it corrects the entry; in a
 *   recovery that already ends in a known entry it corrects that one
 * - catch, exit: of the stroke that the frame lies in
 * - next entry: of the latest stroke that began before the frame
 */
export function eventOnFrame(
  strokes: readonly DeskStroke[],
  press: { readonly arm: Arm; readonly event: EventName; readonly frame: number; readonly newId: string },
): EventOutcome {
  const { arm, event, frame } = press;
  const own = strokesOf(strokes, arm);
  if (event === 'entry') return entryOnFrame(own, press);
  const latest = own.filter(({ entry }) => (event === 'nextEntry' ? entry < frame : entry <= frame)).at(-1);
  const over = latest && event !== 'nextEntry' && frame >= (latest.nextEntry ?? Infinity);
  if (!latest || over) {
    return refused(`No ${arm} stroke here yet. Set its entry first, on the frame where the hand enters.`);
  }
  return eventOfStroke(strokes, latest, event, frame);
}

function entryOnFrame(
  own: readonly DeskStroke[],
  { arm, frame, newId }: { readonly arm: Arm; readonly frame: number; readonly newId: string },
): EventOutcome {
  const before = own.filter(({ entry }) => entry <= frame).at(-1);
  const fresh: DeskStroke = {
    id: newId,
    arm,
    entry: frame,
    catch: null,
    exit: null,
    nextEntry: null,
    breath: false,
  };
  if (!before) return ok([{ before: null, after: fresh }]);
  if (before.entry === frame) return refused('The entry is on this frame already.');
  if (frame < (before.catch ?? before.exit ?? Infinity)) return eventOfStroke(own, before, 'entry', frame);
  if (before.exit === null || frame <= before.exit) {
    return refused(
      `The stroke that began on frame ${before.entry} is not over here. Set its exit first; a new entry follows it.`,
    );
  }
  const following = own.find(({ entry }) => entry > before.entry);
  if (following && before.nextEntry === following.entry) {
    return eventOfStroke(own, following, 'entry', frame);
  }
  const begin: StrokeEdit = { before: null, after: fresh };
  const endsHere = before.nextEntry === null ? !following : frame < before.nextEntry;
  return ok(endsHere ? [{ before, after: { ...before, nextEntry: frame } }, begin] : [begin]);
}

/** Sets one event of a known stroke. A next entry and the entry of the following stroke that lie on one frame move together. */
export function eventOfStroke(
  strokes: readonly DeskStroke[],
  stroke: DeskStroke,
  event: EventName,
  frame: number | null,
): EventOutcome {
  if (frame === null && event !== 'nextEntry') {
    return refused(`The ${eventWords[event]} can be moved, not taken away. Remove the stroke instead.`);
  }
  const others = strokesOf(strokes, stroke.arm).filter(({ id }) => id !== stroke.id);
  const edits: StrokeEdit[] = [{ before: stroke, after: { ...stroke, [event]: frame } }];
  if (event === 'nextEntry' && stroke.nextEntry !== null && frame !== null) {
    const following = others.find(({ entry }) => entry === stroke.nextEntry);
    if (following) edits.push({ before: following, after: { ...following, entry: frame } });
  }
  if (event === 'entry' && frame !== null) {
    const previous = others.find(({ nextEntry }) => nextEntry === stroke.entry);
    if (previous) edits.push({ before: previous, after: { ...previous, nextEntry: frame } });
  }
  const wrong = edits.map(({ after }) => wrongOrder(after)).find((words) => words !== null);
  if (wrong) return refused(wrong);
  const changed = new Map(edits.map(({ after }) => [after.id, after]));
  const overlap = overlapOf(
    [...others, stroke].map((one) => changed.get(one.id) ?? one),
    edits.map(({ after }) => after),
  );
  return overlap ? refused(overlap) : ok(edits);
}

/** Events that are set must follow each other; the sentence names the two that do not. */
function wrongOrder(stroke: DeskStroke): string | null {
  const set = eventsInOrder.filter((event) => stroke[event] !== null);
  for (const [at, event] of set.entries()) {
    const earlier = set[at - 1];
    if (!earlier || Number(stroke[event]) > Number(stroke[earlier])) continue;
    return `The ${eventWords[event]} has to come after the ${eventWords[earlier]}: ${eventWords[earlier]} on frame ${stroke[earlier]}, ${eventWords[event]} on frame ${stroke[event]}.`;
  }
  return stroke.nextEntry !== null && stroke.exit === null
    ? 'Set the exit before the next entry, so that the stroke has an end.'
    : null;
}

function overlapOf(all: readonly DeskStroke[], changed: readonly DeskStroke[]): string | null {
  for (const stroke of changed) {
    const other = all.find(
      (one) => one.id !== stroke.id && stroke.entry < lastFrameOf(one) && one.entry < lastFrameOf(stroke),
    );
    if (other) {
      return `Another ${stroke.arm} stroke goes from frame ${other.entry} to ${lastFrameOf(other)}. Move that one first; an arm does one stroke at a time.`;
    }
  }
  return null;
}
