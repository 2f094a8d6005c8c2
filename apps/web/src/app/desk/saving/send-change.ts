import type { Api } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { getClip, putCalibration, putDistance, updateClip } from '@stillstroke/contract/clips';
import { clipScaleSchema, deleteScale, getScale, putScale, type Scale } from '@stillstroke/contract/scale';
import { deleteMark, listMarks, markSchema, putMark } from '@stillstroke/contract/marks';
import {
  createStroke,
  deleteStroke,
  listStrokes,
  strokeSchema,
  updateStroke,
} from '@stillstroke/contract/strokes';
import { firstValueFrom, timeout, type Observable } from 'rxjs';
import { isComplete } from '../state/desk-mark';
import { deskStrokeOf, isWhole, sourcesOf, type DeskStroke } from '../state/desk-stroke';
import { sameWanted, type PendingChange, type Wanted } from './pending-change';
import type { StopReason } from './save-state';

/** What the server has of a thing. */
export interface Theirs {
  readonly wanted: Wanted;
  /** 0 when it is not there. */
  readonly version: number;
}

export type SendResult =
  | { readonly kind: 'done'; readonly version: number }
  | { readonly kind: 'conflict'; readonly theirs: Theirs }
  | { readonly kind: 'refused'; readonly words: string }
  /** Not reached, or not now: send it again. */
  | { readonly kind: 'later' }
  | { readonly kind: 'stopped'; readonly why: StopReason };

const ANSWER_WITHIN_MS = 20_000;

/** Sends changes of one clip and reads what the server has of them. */
export class ChangeSender {
  constructor(
    private readonly api: Api,
    private readonly clipId: string,
    /** Called with the spread that the clip's marks are read with, as often as the server says it. */
    private readonly onSpread: (spread: Clip['jointUncertaintyPx']) => void = () => undefined,
  ) {}

  async send(change: PendingChange): Promise<SendResult> {
    try {
      return { kind: 'done', version: await this.deliver(change) };
    } catch (error) {
      return this.refusal(change, error);
    }
  }

  /** What the server has now. */
  async fetchTheirs(wanted: Wanted): Promise<Theirs> {
    const params = { id: this.clipId };
    switch (wanted.kind) {
      case 'mark': {
        const { items } = await answer(this.api.call(listMarks, { params }));
        return theirMark(
          wanted,
          items.find(({ arm, frame }) => arm === wanted.arm && frame === wanted.frame),
        );
      }
      case 'stroke': {
        const { items } = await answer(this.api.call(listStrokes, { params }));
        return theirStroke(
          wanted,
          items.find(({ id }) => id === wanted.id),
        );
      }
      case 'scale':
        return theirScale(await answer(this.api.call(getScale, { params })));
      case 'plumb':
      case 'distance':
      case 'facts':
        return theirClip(wanted, await answer(this.api.call(getClip, { params })));
    }
  }

  /** Answers the version that the thing has then. */
  private async deliver({ wanted, base }: PendingChange): Promise<number> {
    const params = { id: this.clipId };
    switch (wanted.kind) {
      case 'mark':
        return this.deliverMark(wanted, base);
      case 'stroke':
        return this.deliverStroke(wanted.id, wanted.stroke, base);
      case 'plumb':
        await answer(this.api.call(putCalibration, { params, body: { plumb: wanted.plumb } }));
        return 1;
      case 'scale':
        return this.deliverScale(wanted.scale, base);
      case 'distance':
        await answer(this.api.call(putDistance, { params, body: { distance: wanted.distance } }));
        return 1;
      case 'facts':
        await answer(this.api.call(updateClip, { params, body: wanted.facts }));
        return 1;
    }
  }

  private async deliverMark(
    { arm, frame, mark }: Extract<Wanted, { kind: 'mark' }>,
    base: number,
  ): Promise<number> {
    const params = { id: this.clipId, arm, frame };
    if (isComplete(mark)) {
      const { shoulder, elbow, wrist } = mark;
      const body = { shoulder, elbow, wrist, version: base };
      const saved = await answer(this.api.call(putMark, { params, body }));
      this.onSpread(saved.jointUncertaintyPx);
      return saved.version;
    }
    await answer(this.api.call(deleteMark, { params, query: base > 0 ? { version: base } : {} }));
    this.askForSpread();
    return 0;
  }

  private async deliverScale(scale: Scale | null, base: number): Promise<number> {
    const params = { id: this.clipId };
    if (scale) {
      return (await answer(this.api.call(putScale, { params, body: { scale, version: base } }))).version;
    }
    await answer(this.api.call(deleteScale, { params, query: base > 0 ? { version: base } : {} }));
    return 0;
  }

  /** Without the mark that is gone another may have placed most of them. */
  private askForSpread(): void {
    this.api.call(getClip, { params: { id: this.clipId } }).subscribe({
      next: ({ jointUncertaintyPx }) => this.onSpread(jointUncertaintyPx),
      // The next mark that is saved says it as well.
      error: () => undefined,
    });
  }

  private async deliverStroke(id: string, stroke: DeskStroke | null, base: number): Promise<number> {
    if (!stroke || !isWhole(stroke)) {
      await answer(this.api.call(deleteStroke, { params: { id } }));
      return 0;
    }
    const { arm, entry, catch: caught, exit, nextEntry, breath } = stroke;
    const events = { entry, catch: caught, exit, nextEntry, breath, ...sourcesOf(stroke) };
    const saved =
      base === 0
        ? this.api.call(createStroke, { params: { id: this.clipId }, body: { id, arm, ...events } })
        : this.api.call(updateStroke, { params: { id }, body: { ...events, version: base } });
    return (await answer(saved)).version;
  }

  private async refusal(change: PendingChange, error: unknown): Promise<SendResult> {
    const problem = problemOf(error);
    const { status, code } = problem;
    if (status === 0 || status >= 500 || status === 408 || status === 429) return { kind: 'later' };
    if (status === 401) return { kind: 'stopped', why: 'signed-out' };
    if (code === 'csrf') return { kind: 'later' };
    if (status === 403) return { kind: 'stopped', why: 'forbidden' };
    if (status === 404) return this.notThere(change);
    if (code !== 'changed-meanwhile') return { kind: 'refused', words: problem.detail };
    const theirs = readTheirs(change.wanted, problem.current);
    // An answer that was lost on its way: what is there is what was sent.
    if (sameWanted(theirs.wanted, change.wanted)) return { kind: 'done', version: theirs.version };
    return { kind: 'conflict', theirs };
  }

  /** The thing is gone, which was wanted or is a conflict, or the whole clip is. */
  private async notThere({ wanted }: PendingChange): Promise<SendResult> {
    try {
      const theirs = await this.fetchTheirs(wanted);
      if (theirs.version > 0) return { kind: 'later' };
      const there = wanted.kind === 'scale' ? wanted.scale !== null : isWholeStroke(wanted);
      const removed = !(wanted.kind === 'mark' && isComplete(wanted.mark)) && !there;
      return removed ? { kind: 'done', version: 0 } : { kind: 'conflict', theirs };
    } catch (error) {
      return problemOf(error).status === 404 ? { kind: 'stopped', why: 'gone' } : { kind: 'later' };
    }
  }
}

/** The first answer; a line that has gone silent counts as lost. */
function answer<T>(call: Observable<T>): Promise<T> {
  return firstValueFrom(call.pipe(timeout(ANSWER_WITHIN_MS)), { defaultValue: undefined as T });
}

function isWholeStroke(wanted: Wanted): boolean {
  return wanted.kind === 'stroke' && wanted.stroke !== null && isWhole(wanted.stroke);
}

function readTheirs(wanted: Wanted, current: unknown): Theirs {
  if (wanted.kind === 'mark') return theirMark(wanted, markSchema.safeParse(current).data);
  if (wanted.kind === 'stroke') return theirStroke(wanted, strokeSchema.safeParse(current).data);
  if (wanted.kind === 'scale') return theirScale(clipScaleSchema.safeParse(current).data);
  return { wanted, version: 1 };
}

function theirMark(
  { arm, frame }: Extract<Wanted, { kind: 'mark' }>,
  mark: ReturnType<typeof markSchema.parse> | undefined,
): Theirs {
  if (!mark) return { wanted: { kind: 'mark', arm, frame, mark: null }, version: 0 };
  const { shoulder, elbow, wrist } = mark;
  return {
    wanted: { kind: 'mark', arm, frame, mark: { arm, frame, shoulder, elbow, wrist } },
    version: mark.version,
  };
}

function theirStroke(
  { id }: Extract<Wanted, { kind: 'stroke' }>,
  stroke: ReturnType<typeof strokeSchema.parse> | undefined,
): Theirs {
  const known = stroke ? deskStrokeOf(stroke) : null;
  return { wanted: { kind: 'stroke', id, stroke: known }, version: stroke?.version ?? 0 };
}

function theirScale(there: ReturnType<typeof clipScaleSchema.parse> | undefined): Theirs {
  return { wanted: { kind: 'scale', scale: there?.scale ?? null }, version: there?.version ?? 0 };
}

function theirClip(wanted: Wanted, clip: Clip): Theirs {
  const { view, travel, stroke, captureRateFactor, fieldOfView, plumb, distance } = clip;
  if (wanted.kind === 'plumb') return { wanted: { kind: 'plumb', plumb }, version: 1 };
  if (wanted.kind === 'distance') return { wanted: { kind: 'distance', distance }, version: 1 };
  return {
    wanted: { kind: 'facts', facts: { view, travel, stroke, captureRateFactor, fieldOfView } },
    version: 1,
  };
}
