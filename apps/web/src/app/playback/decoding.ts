import { canGoOn, startFor } from './decode-plan';
import { Damage } from './damage';
import type { PacketReader } from './packet-reader';
import { PictureDecoder, type PictureSink } from './picture-decoder';

/** How a run towards a frame ended: it came out, the run was called off, or the frame cannot be shown. */
export type RunOutcome = 'ready' | 'stopped' | { readonly damage: string };

/** Thrown when the decoder fails again and again where nothing is damaged. */
export class DecoderGaveUp extends Error {
  override readonly name = 'DecoderGaveUp';
}

/** A run towards one frame. Ranks count hidden leading pictures, frames do not. */
export interface Run {
  readonly rank: number;
  /** Pictures from this rank on are wanted; those before it that nothing refers to are left out. */
  readonly keepFrom: number;
  /** Asked between packets; true calls the run off and leaves the decoder where it is. */
  readonly stop: () => boolean;
}

/** Packets that may wait in the decoder, so that it never idles and a run is still called off at once. */
const QUEUE = 6;
/** Once the frame itself is in, only what the decoder needs to let it out is added. */
const QUEUE_BEYOND = 1;
/** A picture that has not come out this many packets later was dropped by the decoder. */
const LOST_AFTER = 48;
const MOST_FAILURES = 3;

/** Decodes towards frames, going on from where it is whenever that leads there. */
export class Decoding {
  private readonly decoder: PictureDecoder;
  private readonly damage: Damage;
  private out = new Set<number>();
  private skipped = 0;
  private keepFrom = 0;

  constructor(
    private readonly reader: PacketReader,
    private readonly config: VideoDecoderConfig,
    sink: PictureSink,
  ) {
    this.damage = new Damage(reader);
    this.decoder = new PictureDecoder(config, (rank, picture) => {
      this.out.add(rank);
      if (rank < this.keepFrom) picture.close();
      else sink(rank, picture);
    });
  }

  get packetsDecoded(): number {
    return this.decoder.packetsDecoded;
  }

  get packetsSkipped(): number {
    return this.skipped;
  }

  /** Runs until the picture of the rank came out. @throws ByteSourceError, DecoderGaveUp */
  async reach(run: Run): Promise<RunOutcome> {
    for (let failures = 0; failures < MOST_FAILURES;) {
      const outcome = await this.attempt(run);
      if (outcome !== 'failed') return outcome;
      if (!(await this.diagnose())) failures += 1;
    }
    throw new DecoderGaveUp(this.decoder.failure?.message ?? 'The decoder failed repeatedly.');
  }

  close(): void {
    this.decoder.close();
  }

  private lastRun = { start: 0, end: 0 };

  private async attempt(run: Run): Promise<RunOutcome | 'failed'> {
    const position = this.reader.table.presentation[run.rank] ?? 0;
    const start = await this.startFor(position, run.rank);
    if (start === null) {
      return { damage: 'This frame cannot be shown: the file holds no key frame before it.' };
    }
    const verdict = this.damage.verdict(start, position);
    if (verdict !== null) return { damage: verdict };
    const place = this.decoder.place;
    if (place === null || !canGoOn(place, start, position, run.rank)) this.decoder.begin(start);
    this.out = new Set();
    this.keepFrom = run.keepFrom;
    this.lastRun = { start, end: position };
    return this.feedUntilOut(run, start, position);
  }

  private async feedUntilOut(run: Run, start: number, position: number): Promise<RunOutcome | 'failed'> {
    const { packets } = this.reader.table;
    for (;;) {
      if (this.out.has(run.rank)) return 'ready';
      if (this.decoder.failure !== null) return 'failed';
      if (run.stop()) return 'stopped';
      const next = this.decoder.place?.next ?? packets.length;
      const beyond = next > position;
      if (this.decoder.queued > (beyond ? QUEUE_BEYOND : QUEUE)) {
        await this.decoder.change();
      } else if (next >= packets.length || next > position + LOST_AFTER) {
        await this.decoder.drain();
        if (this.decoder.failure !== null) return 'failed';
        if (this.out.has(run.rank)) return 'ready';
        await this.damage.add(position);
        return { damage: this.damage.verdict(start, position) ?? '' };
      } else {
        this.lastRun.end = Math.max(this.lastRun.end, next);
        await this.take(next, run);
        const verdict = this.damage.verdict(start, position);
        if (verdict !== null) return { damage: verdict };
      }
    }
  }

  /** Gives the next packet to the decoder, or leaves it out. */
  private async take(next: number, { rank, keepFrom }: Run): Promise<void> {
    const own = this.reader.rankOf[next] ?? -1;
    const read = await this.reader.read(next);
    if (!read.sound && !this.damage.has(next)) await this.damage.add(next);
    if (await this.isSpoilt(next, own)) {
      this.decoder.skip();
    } else if (read.disposable && own !== rank && own < keepFrom) {
      this.skipped += 1;
      this.decoder.skip();
    } else {
      this.decoder.feed(read.packet, own);
    }
  }

  /** The packet is damaged or builds on one that is: what came out of it would be smeared. */
  private async isSpoilt(position: number, rank: number): Promise<boolean> {
    if (this.damage.none) return false;
    const start = await this.startFor(position, rank);
    return start === null || this.damage.verdict(start, position) !== null;
  }

  private startFor(position: number, rank: number): Promise<number | null> {
    const order = { rankOf: this.reader.rankOf, canStartAt: (at: number) => this.reader.canStartAt(at) };
    return startFor(order, position, rank);
  }

  /**
   * Finds the packet at which the decoder failed, by decoding ever closer stretches from the start of the failed run.
   * A decoder that is drained after each stretch cannot blame the wrong packet.
   *
   * @returns false when the stretch decodes well, so that the failure was the decoder's own
   */
  private async diagnose(): Promise<boolean> {
    const { start, end } = this.lastRun;
    if (await this.decodes(start, end)) return false;
    let good = start - 1;
    let bad = end;
    while (bad - good > 1) {
      const middle = (good + bad) >> 1;
      if (await this.decodes(start, middle)) good = middle;
      else bad = middle;
    }
    await this.damage.add(bad);
    return true;
  }

  private async decodes(start: number, end: number): Promise<boolean> {
    const trial = new PictureDecoder(this.config, (_, picture) => {
      picture.close();
    });
    try {
      trial.begin(start);
      for (let next = start; next <= end && trial.failure === null; next += 1) {
        if (this.damage.has(next)) trial.skip();
        else trial.feed((await this.reader.read(next)).packet, this.reader.rankOf[next] ?? -1);
        while (trial.queued > QUEUE && trial.failure === null) await trial.change();
      }
      if (trial.failure === null) await trial.drain();
      return trial.failure === null;
    } finally {
      trial.close();
    }
  }
}
