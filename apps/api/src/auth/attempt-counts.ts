import type { IncrementResponse, Options, Store } from 'express-rate-limit';

/**
 * Counts attempts by key in fixed windows, in memory. A window ends by the clock however many attempts fall into it, so
 * nobody can keep an account shut by trying on.
 */
export class AttemptCounts implements Store {
  readonly localKeys = true;
  private readonly counts = new Map<string, { hits: number; endsAt: number }>();
  private windowMs = 60_000;
  private prunedAt = 0;

  constructor(private readonly now: () => Date) {}

  init(options: Options): void {
    this.windowMs = options.windowMs;
  }

  increment(key: string): IncrementResponse {
    const now = this.now().getTime();
    this.prune(now);
    const kept = this.counts.get(key);
    const count = kept && kept.endsAt > now ? kept : { hits: 0, endsAt: now + this.windowMs };
    count.hits += 1;
    this.counts.set(key, count);
    return { totalHits: count.hits, resetTime: new Date(count.endsAt) };
  }

  decrement(key: string): void {
    const kept = this.counts.get(key);
    if (kept && kept.hits > 0) kept.hits -= 1;
  }

  resetKey(key: string): void {
    this.counts.delete(key);
  }

  private prune(now: number): void {
    if (now - this.prunedAt < this.windowMs) return;
    this.prunedAt = now;
    for (const [key, count] of this.counts) if (count.endsAt <= now) this.counts.delete(key);
  }
}
