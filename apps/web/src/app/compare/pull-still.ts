import {
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  input,
  signal,
  viewChild,
  type ElementRef,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { drawFrame } from '../playback/draw-frame';
import { formatFigure } from '../ui/figure/format-figure';
import { forearmAt, frameAtShare, type ComparedStroke } from './pull-stroke';
import type { StillSource } from './still-source';

/** One arm at a share of its pull: the frame itself, and the forearm against the plumb as the marks give it. */
@Component({
  selector: 'st-pull-still',
  imports: [RouterLink],
  templateUrl: './pull-still.html',
  styleUrl: './pull-still.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PullStill {
  readonly stroke = input.required<ComparedStroke>();
  readonly share = input.required<number>();
  readonly source = input.required<StillSource>();

  private readonly canvas = viewChild.required<ElementRef<HTMLCanvasElement>>('canvas');
  private readonly timestampsUs = signal<readonly number[] | null>(null);
  protected readonly fault = signal<string | null>(null);

  protected readonly frame = computed(() => {
    const times = this.timestampsUs();
    return times && frameAtShare(this.stroke(), this.share(), times);
  });
  protected readonly forearm = computed(() => forearmAt(this.stroke(), this.share()));
  protected readonly forearmText = computed(() => {
    const deg = this.forearm();
    return deg === null ? 'not marked here' : formatFigure(deg, 'deg', null, true);
  });

  constructor() {
    afterRenderEffect({ write: (onCleanup) => this.loadTimes(onCleanup) });
    afterRenderEffect({ write: (onCleanup) => this.draw(onCleanup) });
  }

  private loadTimes(onCleanup: (undo: () => void) => void): void {
    const { clipId } = this.stroke();
    let current = true;
    onCleanup(() => (current = false));
    this.source()
      .timestampsUs(clipId)
      .then((times) => current && this.timestampsUs.set(times))
      .catch((error: unknown) => current && this.fault.set(sayFault(error)));
  }

  private draw(onCleanup: (undo: () => void) => void): void {
    const frame = this.frame();
    if (frame === null) return;
    const canvas = this.canvas().nativeElement;
    const abort = new AbortController();
    onCleanup(() => abort.abort());
    this.source()
      .frame(this.stroke().clipId, frame, abort.signal)
      .then(({ answer, source }) => {
        if (!answer.ok) {
          if (answer.reason !== 'aborted') this.fault.set(answer.message);
          return;
        }
        try {
          const context = canvas.getContext('2d');
          if (abort.signal.aborted || !context) return;
          canvas.width = source.index.width;
          canvas.height = source.index.height;
          drawFrame(context, answer.image, source.index);
          this.fault.set(null);
        } finally {
          answer.image.close();
        }
      })
      .catch((error: unknown) => this.fault.set(sayFault(error)));
  }
}

function sayFault(error: unknown): string {
  return error instanceof Error ? error.message : 'The picture cannot be shown.';
}
