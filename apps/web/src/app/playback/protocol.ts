import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import type {
  FrameDamage,
  FrameSourceStats,
  OpenClipOptions,
  PlaybackFault,
  StepDirection,
} from './frame-source';

/** What the page asks of the worker. `id` pairs an answer with its question. */
export type ToWorker =
  | ({ readonly kind: 'open'; readonly id: number } & OpenClipOptions)
  | { readonly kind: 'frame'; readonly id: number; readonly frame: number; readonly keep: boolean }
  | { readonly kind: 'cancel'; readonly id: number }
  | { readonly kind: 'hint'; readonly direction: StepDirection }
  | { readonly kind: 'stats'; readonly id: number }
  | { readonly kind: 'close'; readonly id: number };

/** What the worker counts; the page adds what it lent out. */
export type WorkerStats = Omit<FrameSourceStats, 'lentFrames'>;

/** What the worker answers. An `image` is transferred: the page owns it. */
export type ToPage =
  | { readonly kind: 'opened'; readonly id: number; readonly index: ClipIndex }
  | { readonly kind: 'refused'; readonly id: number; readonly code: PlaybackFault; readonly message: string }
  | { readonly kind: 'picture'; readonly id: number; readonly image: VideoFrame }
  | {
      readonly kind: 'no-picture';
      readonly id: number;
      readonly reason: FrameDamage | PlaybackFault;
      readonly message: string;
    }
  | { readonly kind: 'stats'; readonly id: number; readonly stats: WorkerStats }
  | { readonly kind: 'closed'; readonly id: number };
