import type { KnownDistance, Plumb } from '@stillstroke/contract/clip-facts';
import type { Scale } from '@stillstroke/contract/scale';
import type { Arm } from '@stillstroke/contract/strokes';
import type { ClipFacts, DeskChange } from '../state/desk-change';
import { thingOf } from '../state/desk-change';
import { isComplete, sameMark, type DeskMark } from '../state/desk-mark';
import { isWhole, sameStroke, type DeskStroke } from '../state/desk-stroke';

/** What one thing of the clip is to become; null: taken away. */
export type Wanted =
  | { readonly kind: 'mark'; readonly arm: Arm; readonly frame: number; readonly mark: DeskMark | null }
  | { readonly kind: 'stroke'; readonly id: string; readonly stroke: DeskStroke | null }
  | { readonly kind: 'plumb'; readonly plumb: Plumb | null }
  | { readonly kind: 'scale'; readonly scale: Scale | null }
  | { readonly kind: 'distance'; readonly distance: KnownDistance | null }
  /** Only what was changed, so that another's change of another fact stays. */
  | { readonly kind: 'facts'; readonly facts: Partial<ClipFacts> };

/** A change that the server has not acknowledged. Plain data: this is what is kept on the device. */
export interface PendingChange {
  readonly id: string;
  /** Whose clip: user and clip. */
  readonly owner: string;
  /** Rises along the changes of a clip. */
  readonly order: number;
  /** See `thingOf`. */
  readonly thing: string;
  readonly wanted: Wanted;
  /** Version of the thing on the server that this was made on: 0 when it was not there. Things without versions have 1. */
  readonly base: number;
  /** True once it was sent: whether it arrived is not known, so later changes are not folded into it. */
  readonly tried: boolean;
}

/** Unfinished: a mark without all joints, a stroke without its events. The server knows only finished ones. */
export function isDraft(wanted: Wanted): boolean {
  if (wanted.kind === 'mark') return wanted.mark !== null && !isComplete(wanted.mark);
  if (wanted.kind === 'stroke') return wanted.stroke !== null && !isWhole(wanted.stroke);
  return false;
}

/** Nothing to tell the server: a draft of something it does not have. It is kept on the device. */
export function isParked({ wanted, base, tried }: PendingChange): boolean {
  return isDraft(wanted) && base === 0 && !tried;
}

export function wantedOf(change: DeskChange): Wanted {
  switch (change.kind) {
    case 'mark':
      return { kind: 'mark', arm: change.arm, frame: change.frame, mark: change.after };
    case 'stroke':
      return { kind: 'stroke', id: change.id, stroke: change.after };
    case 'plumb':
      return { kind: 'plumb', plumb: change.after };
    case 'scale':
      return { kind: 'scale', scale: change.after };
    case 'distance':
      return { kind: 'distance', distance: change.after };
    case 'facts':
      return { kind: 'facts', facts: differing(change.before, change.after) };
  }
}

/** The later wish, with what the earlier one of the same thing changed beside it. */
export function folded(earlier: Wanted, later: Wanted): Wanted {
  return earlier.kind === 'facts' && later.kind === 'facts'
    ? { kind: 'facts', facts: { ...earlier.facts, ...later.facts } }
    : later;
}

export function thingWanted(wanted: Wanted): string {
  switch (wanted.kind) {
    case 'mark':
      return thingOf({ ...wanted, before: null, after: null });
    case 'stroke':
      return thingOf({ ...wanted, before: null, after: null });
    default:
      return wanted.kind;
  }
}

export function isNothing(wanted: Wanted): boolean {
  return (
    (wanted.kind === 'mark' && wanted.mark === null) ||
    (wanted.kind === 'stroke' && wanted.stroke === null) ||
    (wanted.kind === 'scale' && wanted.scale === null)
  );
}

/** Whether the server holds what is wanted already. */
export function sameWanted(a: Wanted, b: Wanted): boolean {
  if (a.kind === 'mark' && b.kind === 'mark') return sameMark(a.mark, b.mark);
  if (a.kind === 'stroke' && b.kind === 'stroke') return sameStroke(a.stroke, b.stroke);
  if (a.kind === 'scale' && b.kind === 'scale') return JSON.stringify(a.scale) === JSON.stringify(b.scale);
  return false;
}

function differing(before: ClipFacts, after: ClipFacts): Partial<ClipFacts> {
  const changed = Object.entries(after).filter(([key, value]) => before[key as keyof ClipFacts] !== value);
  return Object.fromEntries(changed);
}
