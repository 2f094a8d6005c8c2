import { computed, signal } from '@angular/core';
import { reversed, thingOf, type DeskChange } from './desk-change';

/**
 * How an action enters the history.
 *
 * - `step`: an undo step of its own
 * - `merge`: joins the step before when that was the same action on the same things and nothing came between
 * - `never`: changes nothing that could be undone
 */
export type HistoryPolicy = 'step' | 'merge' | 'never';

/** Every action of the Desk with its policy. */
export const historyPolicies = {
  'place-joint': 'step',
  /** A drag is previewed while it lasts and becomes one step when it ends. */
  'move-joint': 'step',
  /** Holding an arrow key down is one step back. */
  'nudge-joint': 'merge',
  'type-joint': 'step',
  'remove-mark': 'step',
  /** One step, also where it ends one stroke and begins the next. */
  'set-event': 'step',
  'set-event-source': 'step',
  'set-breath': 'step',
  'remove-stroke': 'step',
  'set-plumb': 'step',
  'set-distance': 'step',
  'set-facts': 'merge',
  'set-scale': 'step',
  'nudge-scale': 'merge',
  preview: 'never',
  'go-to-frame': 'never',
  'choose-arm-or-joint': 'never',
  /** Somebody else's version, taken over in a conflict. */
  'take-theirs': 'never',
} as const satisfies Record<string, HistoryPolicy>;

export type DeskAction = keyof typeof historyPolicies;

/** Where the coach was when the change was made, so that undo leads back there. */
export interface HistoryPlace {
  readonly frame: number;
  readonly arm: 'left' | 'right';
}

export interface HistoryStep {
  readonly action: DeskAction;
  /** `the left elbow on frame 168` */
  readonly words: string;
  readonly changes: readonly DeskChange[];
  readonly place: HistoryPlace;
}

/** Undo and redo over whole changes. Knows nothing of the clip: it hands out the changes to apply. */
export class DeskHistory {
  private readonly done = signal<readonly HistoryStep[]>([]);
  private readonly undone = signal<readonly HistoryStep[]>([]);
  private closed = false;

  readonly undoWords = computed(() => this.done().at(-1)?.words ?? null);
  readonly redoWords = computed(() => this.undone().at(-1)?.words ?? null);

  record(step: HistoryStep): void {
    const policy: HistoryPolicy = historyPolicies[step.action];
    if (policy === 'never') return;
    const last = this.done().at(-1);
    const joins = policy === 'merge' && !this.closed && last !== undefined && isSameAct(last, step);
    this.closed = false;
    this.undone.set([]);
    this.done.update((steps) => (joins ? [...steps.slice(0, -1), joined(last, step)] : [...steps, step]));
  }

  /** What comes next does not join the step before: the coach went elsewhere in between. */
  close(): void {
    this.closed = true;
  }

  /** The step to take back, its changes turned round and in reverse order; null when there is none. */
  undo(): HistoryStep | null {
    const step = this.done().at(-1);
    if (!step) return null;
    this.done.update((steps) => steps.slice(0, -1));
    this.undone.update((steps) => [...steps, step]);
    this.closed = true;
    return { ...step, changes: [...step.changes].reverse().map(reversed) };
  }

  redo(): HistoryStep | null {
    const step = this.undone().at(-1);
    if (!step) return null;
    this.undone.update((steps) => steps.slice(0, -1));
    this.done.update((steps) => [...steps, step]);
    this.closed = true;
    return step;
  }
}

function isSameAct(a: HistoryStep, b: HistoryStep): boolean {
  return (
    a.action === b.action &&
    a.words === b.words &&
    a.changes.map(thingOf).join() === b.changes.map(thingOf).join()
  );
}

function joined(first: HistoryStep, second: HistoryStep): HistoryStep {
  const changes = second.changes.map(
    (change, at) => ({ ...change, before: first.changes[at]?.before ?? null }) as DeskChange,
  );
  return { ...second, changes };
}
