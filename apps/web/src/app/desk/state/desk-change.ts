import type {
  FieldOfView,
  KnownDistance,
  Plumb,
  StrokeKind,
  Travel,
  View,
} from '@stillstroke/contract/clip-facts';
import type { Scale } from '@stillstroke/contract/scale';
import type { Arm } from '@stillstroke/contract/strokes';
import { markKey, type DeskMark } from './desk-mark';
import type { DeskStroke } from './desk-stroke';

/** What is said about a clip beside its plumb. */
export interface ClipFacts {
  readonly view: View;
  readonly travel: Travel;
  readonly stroke: StrokeKind;
  /** World seconds per file second. */
  readonly captureRateFactor: number;
  /** Null while nobody has said it. */
  readonly fieldOfView: FieldOfView | null;
}

/** One thing of the clip that becomes another: null is "not there". Whole values, so that a change can be turned round. */
export type DeskChange =
  | {
      readonly kind: 'mark';
      readonly arm: Arm;
      readonly frame: number;
      readonly before: DeskMark | null;
      readonly after: DeskMark | null;
    }
  | {
      readonly kind: 'stroke';
      readonly id: string;
      readonly before: DeskStroke | null;
      readonly after: DeskStroke | null;
    }
  | { readonly kind: 'plumb'; readonly before: Plumb | null; readonly after: Plumb | null }
  | { readonly kind: 'scale'; readonly before: Scale | null; readonly after: Scale | null }
  | {
      readonly kind: 'distance';
      readonly before: KnownDistance | null;
      readonly after: KnownDistance | null;
    }
  | { readonly kind: 'facts'; readonly before: ClipFacts; readonly after: ClipFacts };

/** Names the thing that a change is about: `mark:left:168`, `stroke:<id>`, `plumb`, `scale`, `distance`, `facts`. */
export function thingOf(change: DeskChange): string {
  switch (change.kind) {
    case 'mark':
      return `mark:${markKey(change.arm, change.frame)}`;
    case 'stroke':
      return `stroke:${change.id}`;
    case 'plumb':
    case 'scale':
    case 'distance':
    case 'facts':
      return change.kind;
  }
}

/** The change that takes this one back. */
export function reversed(change: DeskChange): DeskChange {
  return { ...change, before: change.after, after: change.before } as DeskChange;
}
