import type { ClipIndex } from '@stillstroke/clip-index/frame-index';

/** Why a whole clip cannot be played here, or why a request came to nothing though its frame may be sound. */
export type PlaybackFault =
  /** Bytes did not arrive. The frame may be asked for again: nothing else is lost. */
  | 'network'
  /** The decoder failed on a clip from which it had taken frames before, and again when started anew. */
  | 'decoder-gave-up'
  /** The browser has no WebCodecs. */
  | 'no-webcodecs'
  /** WebCodecs is withheld because the page came over plain HTTP from another device. */
  | 'insecure-context'
  /** The browser does not decode this codec. */
  | 'unsupported-codec'
  /** The file is no clip; see `ClipRefusal`. */
  | 'unreadable'
  /** The caller took the request back, a newer one overtook it, or the source was closed. */
  | 'aborted';

/** Thrown by `openClip`. `message` is a sentence for the person, with the way on. */
export class PlaybackError extends Error {
  override readonly name = 'PlaybackError';

  constructor(
    readonly code: PlaybackFault,
    message: string,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}

/** A frame whose own data is damaged, or one that refers to such a frame. Other frames are not affected. */
export type FrameDamage = 'corrupt-frame';

/**
 * The picture of exactly the frame asked for, or why there is none.
 *
 * `image` is lent for good: whoever receives it must `close()` it once it is drawn or copied, and may keep it as long as
 * it needs it; it stays valid when the cache drops the frame. It holds the *stored* picture: draw it with `drawFrame`,
 * which applies pixel aspect, rotation and mirroring.
 */
export type FrameAnswer =
  | { readonly ok: true; readonly frame: number; readonly image: VideoFrame }
  | {
      readonly ok: false;
      readonly frame: number;
      readonly reason: FrameDamage | PlaybackFault;
      readonly message: string;
    };

/** Where the next requests will probably go: −1 back, 1 forward, 0 anywhere. */
export type StepDirection = -1 | 0 | 1;

/** What the source holds at this moment. Frames count as open until closed, whoever holds them. */
export interface FrameSourceStats {
  /** Frames in the cache. */
  readonly cachedFrames: number;
  readonly cachedBytes: number;
  readonly budgetBytes: number;
  /** Pictures that are open in the worker, counted apart from the cache; more than `cachedFrames` would be a leak. */
  readonly openInWorker: number;
  /** Frames handed out by `frame()` and not closed yet. */
  readonly lentFrames: number;
  /** Bytes read from the network since opening. */
  readonly bytesFetched: number;
  /** Packets given to the decoder since opening. */
  readonly packetsDecoded: number;
  /** Packets left out on the way to a frame because nothing refers to them. */
  readonly packetsSkipped: number;
  /** Requests answered `aborted` because a newer one overtook them. */
  readonly overtaken: number;
}

/** One opened clip. */
export interface FrameSource {
  readonly index: ClipIndex;

  /**
   * Answers frame n, 0-based in presentation order. A newer call overtakes those still waiting, which answer
   * `aborted`. Never rejects.
   *
   * @throws RangeError at once when n is no frame of the clip
   */
  frame(
    n: number,
    options?: { readonly signal?: AbortSignal; readonly keep?: boolean },
  ): Promise<FrameAnswer>;

  /** Tells which way the person is going, so that frames ahead are decoded before they are asked for. */
  hint(direction: StepDirection): void;

  stats(): Promise<FrameSourceStats>;

  /** Closes every frame that the cache holds and stops the worker. Lent frames stay with their holders. */
  close(): Promise<void>;
}

/** What to open and how much memory it may take. */
export interface OpenClipOptions {
  /** Where the clip's file is served with support for Range requests. */
  readonly mediaUrl: string;
  /** The server's index, when it is at hand: a clip that does not agree with it is refused as `unreadable`. */
  readonly index?: Pick<ClipIndex, 'timestampsUs' | 'keyFrames'>;
  /** Most bytes of decoded pictures to keep; a 4K frame takes 12 MB. Never less than a few frames. */
  readonly budgetBytes: number;
}
