import { DestroyRef, inject, Injectable, signal } from '@angular/core';
import { getClipMedia } from '@stillstroke/contract/clips';
import { endpointUrl } from '../../core/api/endpoint-url';
import { type FrameSource, PlaybackError, type PlaybackFault } from '../../playback/frame-source';
import { openClip } from '../../playback/open-clip';
import { PictureLoader } from './picture-loader';

/** How far the clip's frames have come. */
export type ClipFramesState =
  | { readonly kind: 'closed' }
  | { readonly kind: 'opening' }
  | { readonly kind: 'open'; readonly source: FrameSource; readonly loader: PictureLoader }
  | { readonly kind: 'failed'; readonly code: PlaybackFault; readonly message: string };

/** Opens a clip's frames; replaced where no worker is to be started. */
@Injectable({ providedIn: 'root' })
export class ClipOpener {
  open(clipId: string): Promise<FrameSource> {
    return openClip({
      mediaUrl: endpointUrl(getClipMedia, { id: clipId }),
      budgetBytes: frameBudget(),
    });
  }
}

/** The frames of the clip on the Desk: one at a time, everything closed when another comes or the Desk goes. */
@Injectable()
export class ClipFrames {
  private readonly opener = inject(ClipOpener);
  private readonly stateNow = signal<ClipFramesState>({ kind: 'closed' });
  private asked: { readonly clipId: string; readonly timesUs: readonly number[] } | null = null;

  readonly state = this.stateNow.asReadonly();

  constructor() {
    inject(DestroyRef).onDestroy(() => {
      this.close();
    });
  }

  /**
   * Opens a clip in place of the one before; asked again for the same one it does nothing. A clip whose frames are not
   * those that the server knows is refused: every mark on it would belong to another picture.
   *
   * @param timesUs the server's presentation times, whole microseconds
   */
  open(clipId: string, timesUs: readonly number[]): void {
    if (this.asked?.clipId === clipId && this.stateNow().kind !== 'failed') return;
    this.close();
    const asked = { clipId, timesUs };
    this.asked = asked;
    this.stateNow.set({ kind: 'opening' });
    this.opener.open(clipId).then(
      (source) => {
        if (this.asked === asked) this.stateNow.set(openedState(source, timesUs));
        if (this.asked !== asked || this.stateNow().kind === 'failed') void source.close();
      },
      (error: unknown) => {
        if (this.asked === asked) this.stateNow.set({ kind: 'failed', ...faultOf(error) });
      },
    );
  }

  /** Opens the clip anew, as after a lost connection or a decoder that gave up. */
  reopen(): void {
    const { asked } = this;
    if (!asked) return;
    this.close();
    this.open(asked.clipId, asked.timesUs);
  }

  close(): void {
    const before = this.stateNow();
    this.asked = null;
    this.stateNow.set({ kind: 'closed' });
    if (before.kind !== 'open') return;
    before.loader.close();
    void before.source.close();
  }
}

function openedState(source: FrameSource, timesUs: readonly number[]): ClipFramesState {
  const own = source.index.timestampsUs;
  const agrees = own.length === timesUs.length && own.every((time, frame) => time === timesUs[frame]);
  if (agrees) return { kind: 'open', source, loader: new PictureLoader(source) };
  return {
    kind: 'failed',
    code: 'unreadable',
    message:
      'The frames of this clip are not those that were found when it was uploaded, so its marks would sit on other pictures. Reload the page; if it happens again, upload the clip anew.',
  };
}

function faultOf(error: unknown): { code: PlaybackFault; message: string } {
  if (error instanceof PlaybackError) return { code: error.code, message: error.message };
  return { code: 'unreadable', message: 'The clip could not be opened. Reload the page and try again.' };
}

const MEGABYTE = 1 << 20;

/** Bytes of decoded pictures to keep: a share of what the device says it has. */
function frameBudget(): number {
  const { deviceMemory = 4 } = navigator as Navigator & { readonly deviceMemory?: number };
  return Math.min(512, Math.max(128, deviceMemory * 64)) * MEGABYTE;
}
