import { computed, inject, Injectable, signal } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { listMarks, type Mark } from '@stillstroke/contract/marks';
import { getMeasures } from '@stillstroke/contract/measures';
import { listSessions } from '@stillstroke/contract/sessions';
import { listStrokes, type Stroke } from '@stillstroke/contract/strokes';
import { cameraRoll } from '@stillstroke/geometry/calibration/plumb';
import { firstValueFrom } from 'rxjs';
import { StillSource } from '../../compare/still-source';
import { Api } from '../../core/api/api';
import type { FramePicture } from './compose-still';
import { frameCanvas } from './frame-canvas';

/** A clip that stills can be made of. */
export interface ShelfClip {
  readonly clip: Clip;
  /** Of its session. */
  readonly date: string;
}

/** A stroke with the frames that are worth showing. */
export interface ShelfStroke extends Stroke {
  /** Computed; null where the marks do not give it. */
  readonly midPull: number | null;
  /** First frame at which the forearm is vertical; null where it is not reached or not marked. */
  readonly vertical: number | null;
}

interface OnClip {
  readonly marks: readonly Mark[];
  readonly strokes: readonly ShelfStroke[];
}

/** An athlete's clips with what is on them, and their frames as pictures. One per page. */
@Injectable()
export class FilmShelf {
  private readonly api = inject(Api);
  private readonly source = new StillSource();
  private readonly found = signal<readonly ShelfClip[]>([]);
  private readonly read = new Map<string, Promise<OnClip>>();

  /** Ready clips, newest session first. */
  readonly clips = this.found.asReadonly();
  private readonly byId = computed(() => new Map(this.found().map((one) => [one.clip.id, one])));

  async open(athleteId: string): Promise<void> {
    const call = this.api.call(listSessions, { params: { id: athleteId }, query: { limit: 50 } });
    const { items } = await firstValueFrom(call);
    this.found.set(
      items.flatMap(({ date, clips }) =>
        clips.filter(({ status }) => status === 'ready').map((clip) => ({ clip, date })),
      ),
    );
  }

  clip(clipId: string): ShelfClip | undefined {
    return this.byId().get(clipId);
  }

  /** Marks and strokes of a clip; read once. */
  on(clipId: string): Promise<OnClip> {
    const known = this.read.get(clipId);
    if (known) return known;
    const reading = this.readOn(clipId);
    this.read.set(clipId, reading);
    // What failed may be asked for again.
    reading.catch(() => this.read.delete(clipId));
    return reading;
  }

  /**
   * One frame in full size with its marks.
   *
   * @throws Error with a sentence for the person
   */
  async picture(
    { clipId, frame }: { clipId: string; frame: number },
    label: string | null,
    signal: AbortSignal,
  ): Promise<FramePicture> {
    const [{ marks }, { answer, source }] = await Promise.all([
      this.on(clipId),
      this.source.frame(clipId, frame, signal),
    ]);
    const roll = cameraRoll(this.clip(clipId)?.clip.plumb ?? null);
    return {
      canvas: frameCanvas(answer, source),
      marks: marks.filter((mark) => mark.frame === frame),
      rollDeg: roll.ok ? roll.value.rollDeg : 0,
      label,
    };
  }

  close(): void {
    this.source.close();
  }

  private async readOn(id: string): Promise<OnClip> {
    const params = { id };
    const [marks, strokes, measures] = await Promise.all([
      firstValueFrom(this.api.call(listMarks, { params })),
      firstValueFrom(this.api.call(listStrokes, { params })),
      firstValueFrom(this.api.call(getMeasures, { params })),
    ]);
    const measured = new Map(measures.items.map((one) => [one.strokeId, one]));
    return {
      marks: marks.items,
      strokes: strokes.items.map((stroke) => ({
        ...stroke,
        midPull: measured.get(stroke.id)?.midPull.frame ?? null,
        vertical: measured.get(stroke.id)?.verticalAtShare.frame ?? null,
      })),
    };
  }
}
