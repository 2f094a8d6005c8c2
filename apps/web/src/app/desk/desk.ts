import { LiveAnnouncer } from '@angular/cdk/a11y';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  inject,
  input,
  linkedSignal,
  output,
  signal,
  untracked,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { DeskBar } from './bar/desk-bar';
import { Conflicts } from './conflicts/conflicts';
import { DeskKeyboard } from './keyboard/desk-keyboard';
import { MarksList } from './marks/marks-list';
import { DeskExplainer } from './readings/desk-explainer';
import { HandReadings } from './readings/hand-readings';
import { Readings } from './readings/readings';
import { TargetLines } from './readings/target-lines';
import { TimingReadings } from './readings/timing-readings';
import { DeskSaving } from './saving/desk-saving';
import { ScalePanel } from './scale/scale-panel';
import { FieldOfView } from './set-up/field-of-view';
import { SetUpPanel } from './set-up/set-up-panel';
import type { TheirMark } from './stage/desk-stage';
import { Stage } from './stage/stage';
import { StageController } from './stage/stage-controller';
import { isComplete, markKey } from './state/desk-mark';
import type { DeskState } from './state/desk-state';
import { Strip } from './strip/strip';
import { StrokesPanel } from './strokes/strokes-panel';
import { PanelTabs, type PanelTab } from './tabs/panel-tabs';
import { Transport } from './transport/transport';

const panels: readonly PanelTab[] = [
  { id: 'readings', label: 'Readings' },
  { id: 'strokes', label: 'Strokes' },
  { id: 'marks', label: 'Marks' },
];
const setUp: PanelTab = { id: 'set-up', label: 'Set-up' };
/** How long a sentence stays on the stage. */
const SAID_FOR_MS = 5000;
/** Frames are announced only where the coach stays for this long. */
const FRAME_SAID_AFTER_MS = 500;

/** The Desk of one clip: bar, stage, transport, strip, and the panels beside them. */
@Component({
  selector: 'st-desk',
  imports: [
    Conflicts,
    DeskBar,
    FieldOfView,
    HandReadings,
    MarksList,
    PanelTabs,
    Readings,
    RouterLink,
    ScalePanel,
    SetUpPanel,
    Stage,
    Strip,
    StrokesPanel,
    TargetLines,
    TimingReadings,
    Transport,
  ],
  providers: [DeskKeyboard],
  templateUrl: './desk.html',
  styleUrl: './desk.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Desk {
  protected readonly saving = inject(DeskSaving);
  protected readonly keyboard = inject(DeskKeyboard);
  private readonly announcer = inject(LiveAnnouncer);
  private readonly router = inject(Router);

  readonly state = input.required<DeskState>();

  readonly restore = output();

  protected readonly saidNow = signal<{ words: string; refused: boolean } | null>(null);
  protected readonly firstVisit = linkedSignal({
    source: this.state,
    computation: (state) =>
      untracked(() => state.canEdit && state.plumbAssumed() && state.marks().size === 0),
  });
  protected readonly panels = computed(() => (this.state().canEdit ? [...panels, setUp] : panels));
  protected readonly panel = linkedSignal<boolean, string>({
    source: this.firstVisit,
    computation: (first) => (first ? 'set-up' : 'readings'),
  });
  protected readonly reading = computed(() => {
    const reading = this.state().readingAtFrame()[this.state().arm()];
    if (reading.ok) return { shown: reading.value, reason: null };
    return { shown: null, reason: reading.reason === 'not-marked' ? null : reading.reason };
  });
  protected readonly explainer = computed(() => new DeskExplainer(this.state()));
  protected readonly attention = computed(() => !['saved', 'saving'].includes(this.saving.state().kind));
  protected readonly stopped = computed(() => {
    const state = this.saving.state();
    return state.kind === 'stopped' ? state.why : null;
  });
  protected readonly theirs = computed<readonly TheirMark[]>(() =>
    this.saving.held().flatMap(({ theirs }) => {
      const mark = theirs?.wanted.kind === 'mark' ? theirs.wanted.mark : null;
      return isComplete(mark) ? [mark] : [];
    }),
  );
  protected readonly disputed = computed(
    () => new Set(this.theirs().map(({ arm, frame }) => markKey(arm, frame))),
  );

  constructor() {
    const stage = inject(StageController);
    effect(() => this.keyboard.attach({ state: this.state(), stage }));
    this.followWords();
    this.followFrame();
  }

  protected useFrame(): void {
    const [clip, frame] = [this.state().clip().id, this.state().frame()];
    void this.router.navigate(['/reviews', 'use'], { queryParams: { clip, frame } });
  }

  protected skipSetUp(): void {
    this.firstVisit.set(false);
  }

  /** What a command said: shown for a moment, read out at once. */
  private followWords(): void {
    let hide: ReturnType<typeof setTimeout> | undefined;
    inject(DestroyRef).onDestroy(() => clearTimeout(hide));
    effect(() => {
      const spoken = this.state().spoken();
      if (!spoken) return;
      this.saidNow.set(spoken);
      void this.announcer.announce(spoken.words, spoken.refused ? 'assertive' : 'polite');
      clearTimeout(hide);
      hide = setTimeout(() => this.saidNow.set(null), SAID_FOR_MS);
    });
  }

  /** Where a step has led, for those who cannot see it; not while playing, and not for every frame passed. */
  private followFrame(): void {
    let first = true;
    effect((onCleanup) => {
      const frame = this.state().frame();
      if (first || untracked(this.state().play.playing)) {
        first = false;
        return;
      }
      const wait = setTimeout(
        () => void this.announcer.announce(this.sayFrame(frame), 'polite'),
        FRAME_SAID_AFTER_MS,
      );
      onCleanup(() => clearTimeout(wait));
    });
  }

  private sayFrame(frame: number): string {
    const state = this.state();
    const reading = state.readingAtFrame()[state.arm()];
    if (!reading.ok) return `Frame ${frame}`;
    return `Frame ${frame}, ${state.arm()} forearm ${Math.round(reading.value.angles.forearmDeg)} degrees`;
  }
}
