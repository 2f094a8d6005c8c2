import { computed, signal } from '@angular/core';
import type { Clip, KnownDistance, Plumb } from '@stillstroke/contract/clip-facts';
import type { Scale } from '@stillstroke/contract/scale';
import type { Arm } from '@stillstroke/contract/strokes';
import type { ClipFacts, DeskChange } from './desk-change';
import { markKey, type DeskMark } from './desk-mark';
import type { DeskStroke } from './desk-stroke';

/** A joint or plumb that is being dragged: shown and read as if it were there, not yet part of the clip. */
export type Preview =
  | { readonly kind: 'mark'; readonly arm: Arm; readonly frame: number; readonly mark: DeskMark | null }
  | { readonly kind: 'plumb'; readonly plumb: Plumb | null }
  | { readonly kind: 'scale'; readonly scale: Scale };

/** What has been put on the clip: marks, strokes, plumb, facts. Changed only by whole changes; shows a preview over them. */
export class DeskFilm {
  private readonly storedMarks = signal<ReadonlyMap<string, DeskMark>>(new Map());
  private readonly storedStrokes = signal<readonly DeskStroke[]>([]);
  private readonly storedPlumb = signal<Plumb | null>(null);
  private readonly storedScale = signal<Scale | null>(null);
  private readonly storedDistance = signal<KnownDistance | null>(null);
  private readonly storedFacts;
  private readonly storedSpread;
  private readonly preview = signal<Preview | null>(null);

  /** By arm and frame (`left:168`), with the mark that is being dragged as it looks now. */
  readonly marks = computed<ReadonlyMap<string, DeskMark>>(() => {
    const preview = this.preview();
    const stored = this.storedMarks();
    if (preview?.kind !== 'mark') return stored;
    const shown = new Map(stored);
    const key = markKey(preview.arm, preview.frame);
    if (preview.mark) shown.set(key, preview.mark);
    else shown.delete(key);
    return shown;
  });
  readonly plumb = computed(() => {
    const preview = this.preview();
    return preview?.kind === 'plumb' ? preview.plumb : this.storedPlumb();
  });
  readonly scale = computed(() => {
    const preview = this.preview();
    return preview?.kind === 'scale' ? preview.scale : this.storedScale();
  });
  readonly strokes = this.storedStrokes.asReadonly();
  readonly distance = this.storedDistance.asReadonly();
  readonly facts;
  readonly clip;

  constructor(
    private readonly given: Clip,
    strokes: readonly DeskStroke[],
    marks: readonly DeskMark[],
    scale: Scale | null = null,
  ) {
    const { view, travel, stroke, captureRateFactor, fieldOfView } = given;
    this.storedFacts = signal<ClipFacts>({ view, travel, stroke, captureRateFactor, fieldOfView });
    this.facts = this.storedFacts.asReadonly();
    this.storedSpread = signal(given.jointUncertaintyPx, { equal: sameSpread });
    this.clip = computed<Clip>(() => ({
      ...this.given,
      ...this.storedFacts(),
      plumb: this.plumb(),
      jointUncertaintyPx: this.storedSpread(),
      distance: this.storedDistance(),
    }));
    this.storedPlumb.set(given.plumb);
    this.storedScale.set(scale);
    this.storedDistance.set(given.distance);
    this.storedStrokes.set(inOrder(strokes));
    this.storedMarks.set(new Map(marks.map((mark) => [markKey(mark.arm, mark.frame), mark])));
  }

  /** As stored, without preview. */
  storedMark(arm: Arm, frame: number): DeskMark | null {
    return this.storedMarks().get(markKey(arm, frame)) ?? null;
  }

  stored(): { readonly plumb: Plumb | null; readonly scale: Scale | null } {
    return { plumb: this.storedPlumb(), scale: this.storedScale() };
  }

  show(preview: Preview | null): void {
    this.preview.set(preview);
  }

  /** The spread that the server reads the clip's marks with from now on. */
  takeSpread(spread: Clip['jointUncertaintyPx']): void {
    this.storedSpread.set(spread);
  }

  apply(changes: readonly DeskChange[]): void {
    for (const change of changes) this.applyOne(change);
  }

  private applyOne(change: DeskChange): void {
    switch (change.kind) {
      case 'mark': {
        const marks = new Map(this.storedMarks());
        const key = markKey(change.arm, change.frame);
        if (change.after) marks.set(key, change.after);
        else marks.delete(key);
        this.storedMarks.set(marks);
        break;
      }
      case 'stroke': {
        const others = this.storedStrokes().filter(({ id }) => id !== change.id);
        this.storedStrokes.set(inOrder(change.after ? [...others, change.after] : others));
        break;
      }
      case 'plumb':
        this.storedPlumb.set(change.after);
        break;
      case 'scale':
        this.storedScale.set(change.after);
        break;
      case 'distance':
        this.storedDistance.set(change.after);
        break;
      case 'facts':
        this.storedFacts.set(change.after);
    }
  }
}

function sameSpread(a: Clip['jointUncertaintyPx'], b: Clip['jointUncertaintyPx']): boolean {
  return a.shoulder === b.shoulder && a.elbow === b.elbow && a.wrist === b.wrist;
}

function inOrder(strokes: readonly DeskStroke[]): readonly DeskStroke[] {
  return [...strokes].sort((a, b) => a.entry - b.entry || a.arm.localeCompare(b.arm));
}
