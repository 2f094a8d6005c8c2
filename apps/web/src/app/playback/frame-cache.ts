import type { StepDirection } from './frame-source';

/** What the cache needs of a picture; a `VideoFrame` is one. */
export interface CachedPicture {
  close(): void;
}

/** How much farther a frame counts that lies against the stepping direction. */
const AGAINST = 3;

/**
 * Decoded pictures by rank, at most `budgetBytes` of them. When it is full, the frame farthest from where the person is
 * goes first, and frames behind the direction of stepping count as farther. It owns what it accepts and closes it.
 */
export class FrameCache<Picture extends CachedPicture> {
  private readonly held = new Map<number, { picture: Picture; bytes: number }>();
  private heldBytes = 0;
  private focus = 0;
  private direction: StepDirection = 0;

  constructor(readonly budgetBytes: number) {}

  get size(): number {
    return this.held.size;
  }

  get bytes(): number {
    return this.heldBytes;
  }

  has(rank: number): boolean {
    return this.held.has(rank);
  }

  /** Borrowed: valid until the next call that changes the cache. */
  get(rank: number): Picture | undefined {
    return this.held.get(rank)?.picture;
  }

  /** Where the person is and which way they go. */
  look(focus: number, direction: StepDirection): void {
    this.focus = focus;
    this.direction = direction;
  }

  /**
   * Takes a picture over and keeps it if it is nearer than what would have to go for it; closes it otherwise. The frame
   * in focus is always kept, even alone above the budget.
   */
  offer(rank: number, picture: Picture, bytes: number): boolean {
    this.drop(rank);
    while (this.heldBytes + bytes > this.budgetBytes && this.held.size > 0) {
      const farthest = this.farthest();
      if (this.distance(farthest) <= this.distance(rank)) {
        picture.close();
        return false;
      }
      this.drop(farthest);
    }
    this.held.set(rank, { picture, bytes });
    this.heldBytes += bytes;
    return true;
  }

  clear(): void {
    for (const rank of [...this.held.keys()]) this.drop(rank);
  }

  private drop(rank: number): void {
    const entry = this.held.get(rank);
    if (entry === undefined) return;
    this.held.delete(rank);
    this.heldBytes -= entry.bytes;
    entry.picture.close();
  }

  private farthest(): number {
    let farthest = this.focus;
    let distance = -1;
    for (const rank of this.held.keys()) {
      const own = this.distance(rank);
      if (own > distance) {
        distance = own;
        farthest = rank;
      }
    }
    return farthest;
  }

  private distance(rank: number): number {
    const offset = rank - this.focus;
    if (offset === 0 || this.direction === 0) return Math.abs(offset);
    return Math.sign(offset) === this.direction ? Math.abs(offset) : Math.abs(offset) * AGAINST;
  }
}
