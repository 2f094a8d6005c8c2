import { computed, signal } from '@angular/core';
import type { Joints } from '@stillstroke/contract/repeatability';

/** Sends marks of a round one after the other; what could not be sent stays and is tried again. */
export class RoundSaving {
  private readonly waiting = signal<ReadonlyMap<number, Joints>>(new Map());
  private readonly trouble = signal<string | null>(null);
  private running = false;

  /** What the server or the network said; null while all is well. */
  readonly problem = this.trouble.asReadonly();
  readonly saved = computed(() => this.waiting().size === 0);
  readonly words = computed(() => {
    if (this.saved()) return 'Saved';
    return this.trouble() === null ? 'Saving …' : 'Not saved';
  });

  /**
   * @param send sends one mark; rejects when it was not taken
   * @param wordsOf the sentence for what it rejected with
   */
  constructor(
    private readonly send: (position: number, joints: Joints) => Promise<unknown>,
    private readonly wordsOf: (error: unknown) => string,
  ) {}

  add(position: number, joints: Joints): void {
    this.waiting.update((waiting) => new Map(waiting).set(position, joints));
    void this.run();
  }

  /** Tries again what is waiting. Resolves when nothing is left or something was refused. */
  async run(): Promise<void> {
    if (this.running) return;
    this.running = true;
    this.trouble.set(null);
    for (let next = this.first(); next; next = this.first()) {
      const [position, joints] = next;
      try {
        await this.send(position, joints);
      } catch (error) {
        this.trouble.set(this.wordsOf(error));
        break;
      }
      this.taken(position, joints);
    }
    this.running = false;
  }

  private first(): readonly [number, Joints] | undefined {
    return [...this.waiting()][0];
  }

  /** A joint that was moved meanwhile is still to be sent. */
  private taken(position: number, joints: Joints): void {
    if (this.waiting().get(position) !== joints) return;
    this.waiting.update((waiting) => {
      const rest = new Map(waiting);
      rest.delete(position);
      return rest;
    });
  }
}
