import { signal } from '@angular/core';
import type { DeskChange } from './desk-change';
import type { DeskFilm } from './desk-film';
import type { DeskAction, DeskHistory } from './desk-history';
import type { DeskPlace } from './desk-place';

/** A sentence for the person: shown for a moment and read out. */
export interface Spoken {
  readonly words: string;
  /** True when something was refused and nothing changed. */
  readonly refused: boolean;
  /** Rises with each sentence, so that the same words said twice are two. */
  readonly turn: number;
}

export type ChangeListener = (changes: readonly DeskChange[]) => void;

/** What all commands share: the one way to change the clip, and the one way to say something. */
export class DeskCore {
  private readonly listeners = new Set<ChangeListener>();
  private readonly latest = signal<Spoken | null>(null);

  readonly spoken = this.latest.asReadonly();

  constructor(
    readonly film: DeskFilm,
    readonly place: DeskPlace,
    readonly history: DeskHistory,
    readonly canEdit: boolean,
  ) {}

  /** Applies the changes, enters them in the history by the action's policy, and tells who saves. */
  commit(action: DeskAction, words: string, changes: readonly DeskChange[]): void {
    if (!this.canEdit || changes.length === 0) return;
    this.film.apply(changes);
    const place = { frame: this.place.frame(), arm: this.place.arm() };
    this.history.record({ action, words, changes, place });
    this.tell(changes);
  }

  /** Applies what undo or redo hand out. */
  replay(changes: readonly DeskChange[]): void {
    this.film.apply(changes);
    this.tell(changes);
  }

  listen(listener: ChangeListener): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  say(words: string): true {
    this.latest.set({ words, refused: false, turn: (this.latest()?.turn ?? 0) + 1 });
    return true;
  }

  refuse(words: string): false {
    this.latest.set({ words, refused: true, turn: (this.latest()?.turn ?? 0) + 1 });
    return false;
  }

  private tell(changes: readonly DeskChange[]): void {
    for (const listener of this.listeners) listener(changes);
  }
}
