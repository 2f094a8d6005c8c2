import { ChangeDetectionStrategy, Component, computed, input, signal } from '@angular/core';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { RouterLink } from '@angular/router';
import { WIDEST_GAP } from '@stillstroke/geometry/curves/resample';
import { scaleLinear } from 'd3-scale';
import { area, line } from 'd3-shape';
import { injectNarrow } from '../core/narrow';
import type { Explanation } from '../ui/explain/explanation';
import { How } from '../ui/explain/how';
import { fixed } from '../ui/figure/format-figure';
import {
  armLines,
  marksOf,
  strokesOfKind,
  type ArmLines,
  type CurveAngle,
  type CurvePlace,
  type CurveStrokes,
  type MeanPlace,
} from './curve-lines';
import type { ComparedStroke } from './pull-stroke';

const kindWords = { all: 'all strokes', breathing: 'breathing strokes', others: 'strokes without a breath' };
const arms = ['left', 'right'] as const;

/** Forearm or elbow drop over the pull: every stroke thin, each arm's mean with its spread, and a plumb as playhead. */
@Component({
  selector: 'st-pull-curves',
  imports: [How, MatButtonToggleModule, RouterLink],
  templateUrl: './pull-curves.html',
  styleUrl: './pull-curves.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PullCurves {
  readonly strokes = input.required<readonly ComparedStroke[]>();
  /** Where the stills are, share of the pull 0–1. */
  readonly share = input.required<number>();
  readonly toleranceDeg = input.required<number>();

  protected readonly angle = signal<CurveAngle>('forearm');
  protected readonly kind = signal<CurveStrokes>('all');
  private readonly narrow = injectNarrow();

  protected readonly frame = computed(() =>
    this.narrow()
      ? { width: 360, height: 300, left: 42, right: 350, top: 26, bottom: 254 }
      : { width: 1100, height: 400, left: 48, right: 1080, top: 26, bottom: 354 },
  );
  protected readonly x = computed(() =>
    scaleLinear().domain([0, 1]).range([this.frame().left, this.frame().right]),
  );
  private readonly shown = computed(() => strokesOfKind(this.strokes(), this.kind()));
  private readonly lines = computed(() => arms.map((arm) => armLines(this.shown(), arm, this.angle())));
  /** The same for every kind of stroke, so that kinds can be looked at one after the other. */
  private readonly domain = computed(() => {
    const step = this.angle() === 'forearm' ? 45 : 10;
    const degrees = this.strokes().flatMap((stroke) => marksOf(stroke, this.angle()).map(({ deg }) => deg));
    return [
      Math.floor(Math.min(-step, ...degrees) / step) * step,
      Math.ceil(Math.max(step, ...degrees) / step) * step,
    ] as const;
  });
  private readonly y = computed(() =>
    scaleLinear().domain(this.domain()).range([this.frame().bottom, this.frame().top]),
  );

  protected readonly grid = computed(() => {
    const [low, high] = this.domain();
    const step = this.angle() === 'forearm' ? 45 : (high - low) / 10 > 6 ? 20 : 10;
    const lines = [];
    for (let deg = Math.ceil(low / step) * step; deg <= high; deg += step)
      lines.push({ deg, y: this.y()(deg), text: signed(deg) });
    return lines;
  });
  protected readonly band = computed(() => {
    if (this.angle() !== 'forearm') return null;
    const tolerance = this.toleranceDeg();
    const top = this.y()(tolerance);
    return { top, height: this.y()(-tolerance) - top };
  });
  protected readonly playhead = computed(() => this.x()(this.share()));
  protected readonly drawn = computed(() => this.lines().map((of) => this.draw(of)));
  protected readonly label = computed(
    () =>
      `${this.angle() === 'forearm' ? 'Forearm' : 'Elbow drop'} over the pull, ${kindWords[this.kind()]}; the tables below list it`,
  );
  /** What both arms' strokes have in common where the stills are. */
  protected readonly here = computed(() =>
    this.lines().map(({ arm, percents, strokes }) => ({
      arm,
      text: sayPoint(percents[Math.round(this.share() * 100)], strokes.length),
    })),
  );
  protected readonly table = computed(() => {
    const [left, right] = this.lines();
    return Array.from({ length: 11 }, (_, at) => ({
      percent: at * 10,
      left: sayPoint(left?.percents[at * 10], left?.strokes.length ?? 0),
      right: sayPoint(right?.percents[at * 10], right?.strokes.length ?? 0),
    }));
  });
  protected readonly listed = computed(() =>
    this.lines().flatMap(({ arm, strokes }) =>
      strokes.map(({ stroke }, at) => ({
        stroke,
        name: `${arm === 'left' ? 'Left' : 'Right'} ${at + 1}${stroke.breath ? ', breathing' : ''}`,
        marks: marksOf(stroke, this.angle()).map(({ frame, share, deg }) => ({
          frame,
          text: `${fixed(share * 100, 0)} %: ${signed(deg)}`,
        })),
      })),
    ),
  );
  protected readonly explain = (): Explanation => ({
    entry: 'curves',
    of: `${this.angle() === 'forearm' ? 'Forearm' : 'Elbow drop'} over the pull, ${kindWords[this.kind()]}`,
    result: this.lines()
      .map(({ arm, strokes }) => `${strokes.length} ${arm}`)
      .join(', '),
    interval: null,
    inputs: [
      { name: 'Widest gap that is drawn', value: `${fixed(WIDEST_GAP * 100, 0)} % of the pull` },
      ...this.here().map(({ arm, text }) => ({
        name: `At ${fixed(this.share() * 100, 0)} %, ${arm} arm`,
        value: text,
      })),
    ],
    frames: this.shown().map(({ clipId, catch: caught, arm }) => ({
      clipId,
      frame: caught,
      arm,
      says: `${arm} stroke, catch on frame ${caught}`,
    })),
    parts: [],
    partsOf: 'the band',
    also: [this.angle() === 'forearm' ? 'forearm' : 'elbowDrop', 'projected'],
  });

  private draw({ arm, strokes, mean }: ArmLines) {
    const [x, y] = [this.x(), this.y()];
    const path = line<CurvePlace>()
      .x(({ share }) => x(share))
      .y(({ deg }) => y(deg));
    const spread = area<MeanPlace>()
      .x(({ share }) => x(share))
      .y0(({ deg, sd }) => y(deg - sd))
      .y1(({ deg, sd }) => y(deg + sd));
    return {
      arm,
      thin: strokes.flatMap(({ runs }) => runs.flatMap((run) => path([...run]) ?? [])),
      points: strokes.flatMap(({ stroke }) =>
        marksOf(stroke, this.angle()).map((mark) => ({
          clipId: stroke.clipId,
          key: `${stroke.strokeId} ${mark.frame}`,
          frame: mark.frame,
          x: x(mark.share),
          y: y(mark.deg),
          label: `${arm} ${signed(mark.deg)} on frame ${mark.frame}, open on the Desk`,
        })),
      ),
      mean: mean.flatMap((run) => path([...run]) ?? []),
      band: mean.flatMap((run) => spread([...run]) ?? []),
    };
  }
}

interface Point {
  readonly count: number;
  readonly mean: number | null;
  readonly sd: number | null;
}

/** `+42° ± 4°, 6 of 6 strokes`; the spread is one standard deviation between strokes. */
function sayPoint(point: Point | undefined, strokes: number): string {
  if (!point || point.mean === null) return 'not marked here';
  const of = `${point.count} of ${strokes} ${strokes === 1 ? 'stroke' : 'strokes'}`;
  return point.sd === null
    ? `${signed(point.mean)}, ${of}`
    : `${signed(point.mean)} ± ${fixed(point.sd, point.sd < 1 ? 1 : 0)}°, ${of}`;
}

function signed(deg: number): string {
  const text = fixed(deg, 0);
  return `${text.startsWith('−') || text === '0' ? '' : '+'}${text}°`;
}
