/** What the plan needs to know of a clip. */
export interface DecodeOrder {
  /** Rank in presentation order of every decode position; −1 for packets that are never shown. */
  readonly rankOf: ArrayLike<number>;
  /** Whether decoding can start at a position; may have to read it. */
  readonly canStartAt: (position: number) => Promise<boolean>;
}

/**
 * The position from which to decode to reach the picture of a rank: the nearest start at or before it that is not shown
 * later. Pictures that lead a key frame on screen refer across it, so they need the start before.
 *
 * @returns null when nothing before it can be started at
 */
export async function startFor(order: DecodeOrder, position: number, rank: number): Promise<number | null> {
  for (let start = position; start >= 0; start -= 1) {
    const startRank = order.rankOf[start] ?? -1;
    if (startRank > rank) continue;
    if (await order.canStartAt(start)) return start;
  }
  return null;
}

/** A decoder at work: where it started and which position it takes next. */
export interface DecoderPlace {
  readonly start: number;
  readonly next: number;
  /** Ranks given to it whose pictures have not come out yet. */
  readonly pending: ReadonlySet<number>;
}

/** A gap of this many packets before the next start is decoded through rather than restarted after. */
const THROUGH = 8;

/** True when going on from where the decoder is reaches the picture, with everything it refers to. */
export function canGoOn(place: DecoderPlace, start: number, position: number, rank: number): boolean {
  if (place.start > start) return false;
  if (place.pending.has(rank)) return true;
  return place.next <= position && start - place.next <= THROUGH;
}
