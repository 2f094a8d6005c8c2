import type { EncodedPacket } from 'mediabunny';
import type { DecoderPlace } from './decode-plan';

/** Receives every picture that comes out; owns it from then on. */
export type PictureSink = (rank: number, picture: VideoFrame) => void;

/** A decoder that neither takes nor gives anything for this long, in milliseconds, has given up. */
const STALL_MS = 15_000;

/** Thrown when a decoder stalls; what it was given may be sound. */
export class DecoderStalled extends Error {
  override readonly name = 'DecoderStalled';
}

/**
 * One `VideoDecoder` and where it is in decode order. Packets carry their rank in presentation order as their timestamp,
 * so that equal or odd times in a file cannot confuse its frames.
 */
export class PictureDecoder {
  private decoder: VideoDecoder | null = null;
  private at: { start: number; next: number; pending: Set<number> } | null = null;
  private broken: DOMException | null = null;
  private wake: (() => void) | null = null;
  private fed = 0;

  constructor(
    private readonly config: VideoDecoderConfig,
    private readonly sink: PictureSink,
  ) {}

  /** Null when it has to start anew. */
  get place(): DecoderPlace | null {
    return this.at;
  }

  /** What the decoder reported; it is closed then, until the next `begin`. */
  get failure(): DOMException | null {
    return this.broken;
  }

  get packetsDecoded(): number {
    return this.fed;
  }

  get queued(): number {
    return this.decoder?.decodeQueueSize ?? 0;
  }

  /** Forgets what was decoded and gets ready for the packet at a start position. */
  begin(start: number): void {
    this.broken = null;
    if (this.decoder === null || this.decoder.state === 'closed') this.decoder = this.create();
    else this.decoder.reset();
    this.decoder.configure(this.config);
    this.at = { start, next: start, pending: new Set() };
  }

  /** Gives the packet at `place.next` to the decoder. */
  feed(packet: EncodedPacket, rank: number): void {
    if (this.at === null || this.decoder === null || this.decoder.state !== 'configured') return;
    const type = this.at.next === this.at.start ? 'key' : packet.type;
    // Packets that are never shown get a timestamp of their own beyond all ranks.
    const timestamp = rank >= 0 ? rank : Number.MAX_SAFE_INTEGER / 1e6 + this.at.next;
    this.at.next += 1;
    if (rank >= 0) this.at.pending.add(rank);
    this.fed += 1;
    this.decoder.decode(new EncodedVideoChunk({ type, timestamp: Math.floor(timestamp), data: packet.data }));
  }

  /** Leaves the packet at `place.next` out. */
  skip(): void {
    if (this.at !== null) this.at.next += 1;
  }

  /** Waits until something came out or went in, or the decoder failed. @throws DecoderStalled */
  async change(): Promise<void> {
    if (this.broken !== null) return;
    let timer: ReturnType<typeof setTimeout> | undefined;
    const stalled = await new Promise<boolean>((resolve) => {
      this.wake = () => {
        resolve(false);
      };
      timer = setTimeout(() => {
        resolve(true);
      }, STALL_MS);
    });
    clearTimeout(timer);
    if (stalled) {
      this.close();
      throw new DecoderStalled('The decoder stopped answering.');
    }
  }

  /** Gets every picture out that is still inside; the decoder has to start anew afterwards. */
  async drain(): Promise<void> {
    try {
      await this.decoder?.flush();
    } catch (error) {
      if (error instanceof DOMException && error.name !== 'AbortError') this.broken ??= error;
    }
    this.at = null;
  }

  close(): void {
    if (this.decoder !== null && this.decoder.state !== 'closed') this.decoder.close();
    this.decoder = null;
    this.at = null;
    this.stir();
  }

  private create(): VideoDecoder {
    const decoder = new VideoDecoder({
      output: (picture) => {
        this.at?.pending.delete(picture.timestamp);
        this.sink(picture.timestamp, picture);
        this.stir();
      },
      error: (failure) => {
        if (this.decoder !== decoder) return;
        this.broken = failure;
        this.at = null;
        this.stir();
      },
    });
    decoder.addEventListener('dequeue', () => {
      this.stir();
    });
    return decoder;
  }

  private stir(): void {
    const wake = this.wake;
    this.wake = null;
    wake?.();
  }
}

/**
 * The configuration with which to decode, in software where that is to be had: hardware decoders lend out a handful of
 * pictures and wait for them, and a cache keeps many.
 *
 * @returns null when the browser does not decode this
 */
export async function usableConfig(config: VideoDecoderConfig): Promise<VideoDecoderConfig | null> {
  // Turning and stretching is left to drawing, which follows the clip's index.
  const { codec, codedWidth, codedHeight, description, colorSpace } = config;
  const plain: VideoDecoderConfig = {
    codec,
    ...(codedWidth === undefined ? {} : { codedWidth }),
    ...(codedHeight === undefined ? {} : { codedHeight }),
    ...(description === undefined ? {} : { description }),
    ...(colorSpace === undefined ? {} : { colorSpace }),
  };
  for (const hardwareAcceleration of ['prefer-software', 'no-preference'] as const) {
    const wanted = { ...plain, hardwareAcceleration };
    const answer = await VideoDecoder.isConfigSupported(wanted).catch(() => null);
    if (answer?.supported === true) return wanted;
  }
  return null;
}
