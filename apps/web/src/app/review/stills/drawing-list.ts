import { computed, signal } from '@angular/core';
import type { Drawing, DrawingColour } from '@stillstroke/contract/stills';
import type { PictureSize } from './still-layout';

export type DrawingKind = Drawing['kind'];
export interface DrawnPoint {
  readonly x: number;
  readonly y: number;
}
/** Names of the points of a drawn thing, in order. */
export const pointNames: Readonly<Record<DrawingKind, readonly string[]>> = {
  arrow: ['from', 'to'],
  line: ['from', 'to'],
  angle: ['corner', 'from', 'to'],
  words: ['at'],
};
export const kindNames: Readonly<Record<DrawingKind, string>> = {
  arrow: 'Arrow',
  line: 'Line',
  angle: 'Angle',
  words: 'Words',
};

const MOST = 60;

/** What is drawn on a still by hand, with undo. Points are pixels of the still. */
export class DrawingList {
  private readonly now = signal<readonly Drawing[]>([]);
  private readonly past = signal<readonly (readonly Drawing[])[]>([]);
  private readonly future = signal<readonly (readonly Drawing[])[]>([]);
  private held: readonly Drawing[] | null = null;

  readonly drawings = this.now.asReadonly();
  readonly canUndo = computed(() => this.past().length > 0);
  readonly canRedo = computed(() => this.future().length > 0);
  readonly isFull = computed(() => this.now().length >= MOST);
  /** Index of the chosen one; null for none. */
  readonly chosen = signal<number | null>(null);
  readonly colour = signal<DrawingColour>('white');

  /** Begins anew with what a still has; nothing of it can be undone. */
  load(drawings: readonly Drawing[]): void {
    this.now.set(drawings);
    this.past.set([]);
    this.future.set([]);
    this.chosen.set(null);
  }

  /** Adds one in the middle of the still, chosen, ready to be moved. */
  add(kind: DrawingKind, { width, height }: PictureSize): void {
    const [x, y, away] = [width / 2, height / 2, Math.min(width, height) / 6];
    this.insert(this.made(kind, { x: x - away, y: y + away / 2 }, { x: x + away, y: y - away / 2 }));
  }

  /** Adds one between two places, as drawn with the pointer. */
  drawn(kind: DrawingKind, from: DrawnPoint, to: DrawnPoint): void {
    this.insert(this.made(kind, tenth(from), tenth(to)));
  }

  change(at: number, drawing: Drawing): void {
    this.put(this.now().map((one, index) => (index === at ? drawing : one)));
  }

  remove(at: number): void {
    this.put(this.now().filter((_, index) => index !== at));
    this.chosen.set(null);
  }

  /** Several changes until {@link release} are one step of undo. */
  hold(): void {
    this.held ??= this.now();
  }

  release(): void {
    const before = this.held;
    this.held = null;
    if (before && before !== this.now()) this.remember(before);
  }

  undo(): void {
    const before = this.past().at(-1);
    if (!before) return;
    this.future.update((steps) => [...steps, this.now()]);
    this.past.update((steps) => steps.slice(0, -1));
    this.now.set(before);
    this.chosen.set(null);
  }

  redo(): void {
    const next = this.future().at(-1);
    if (!next) return;
    this.past.update((steps) => [...steps, this.now()]);
    this.future.update((steps) => steps.slice(0, -1));
    this.now.set(next);
    this.chosen.set(null);
  }

  private made(kind: DrawingKind, from: DrawnPoint, to: DrawnPoint): Drawing {
    const colour = this.colour();
    switch (kind) {
      case 'arrow':
      case 'line':
        return { kind, colour, from, to };
      case 'angle':
        // Drawn from its corner along one leg; the other one stands across it.
        return {
          kind,
          colour,
          corner: from,
          from: to,
          to: { x: from.x + (to.y - from.y), y: from.y - (to.x - from.x) },
        };
      case 'words':
        return { kind, colour, at: from, words: 'Here' };
    }
  }

  private insert(drawing: Drawing): void {
    if (this.isFull()) return;
    this.put([...this.now(), drawing]);
    this.chosen.set(this.now().length - 1);
  }

  private put(next: readonly Drawing[]): void {
    if (this.held === null) this.remember(this.now());
    this.now.set(next);
  }

  private remember(before: readonly Drawing[]): void {
    this.past.update((steps) => [...steps, before]);
    this.future.set([]);
  }
}

/** Finer than a tenth of a pixel nobody can point. */
const tenth = ({ x, y }: DrawnPoint): DrawnPoint => ({
  x: Math.round(x * 10) / 10,
  y: Math.round(y * 10) / 10,
});

export function pointsOf(drawing: Drawing): readonly DrawnPoint[] {
  const named = drawing as unknown as Readonly<Record<string, DrawnPoint>>;
  return pointNames[drawing.kind].flatMap((name) => named[name] ?? []);
}

/** The same with one point elsewhere, inside the still. */
export function withPoint(drawing: Drawing, index: number, { x, y }: DrawnPoint, size: PictureSize): Drawing {
  const name = pointNames[drawing.kind][index];
  if (name === undefined) return drawing;
  const inside = (value: number, most: number) => Math.min(Math.max(value, 0), most);
  return { ...drawing, [name]: tenth({ x: inside(x, size.width), y: inside(y, size.height) }) };
}

/** `Arrow from 120, 80 to 300, 200`. */
export function sayDrawing(drawing: Drawing): string {
  const [first, second] = pointsOf(drawing).map(({ x, y }) => `${Math.round(x)}, ${Math.round(y)}`);
  if (drawing.kind === 'words') return `“${drawing.words}” at ${first ?? ''}`;
  if (drawing.kind === 'angle') return `Angle at ${first ?? ''}`;
  return `${kindNames[drawing.kind]} from ${first ?? ''} to ${second ?? ''}`;
}
