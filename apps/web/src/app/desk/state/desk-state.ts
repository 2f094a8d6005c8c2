import { computed, signal, type Signal } from '@angular/core';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Scale } from '@stillstroke/contract/scale';
import type { Mark } from '@stillstroke/contract/marks';
import type { Arm, Stroke } from '@stillstroke/contract/strokes';
import type { Joint } from '@stillstroke/geometry/arm';
import type { StrokeReading } from '../readings/readings';
import type { StripMark, StripStroke } from '../strip/strip-scene';
import { DeskCore, type ChangeListener } from './desk-core';
import { DeskFilm } from './desk-film';
import { DeskHistory } from './desk-history';
import { markKey, type DeskMark } from './desk-mark';
import { DeskPlace } from './desk-place';
import { DeskPlay } from './desk-play';
import { DeskReadings, type FrameReading } from './desk-readings';
import { DeskView } from './desk-view';
import { deskStrokeOf, isWhole, nameStroke, type DeskStroke } from './desk-stroke';
import { Marking } from './marking';
import { needWords, nextToMark, stillToMark, type Progress } from './next-to-mark';
import { ScaleCommands } from './scale-commands';
import { SetUpCommands } from './set-up-commands';
import { StrokeCommands } from './stroke-commands';

/** Everything the Desk needs to know of a clip at opening. */
export interface DeskInput {
  readonly clip: Clip;
  /** Presentation times in whole microseconds. */
  readonly frameTimesUs: readonly number[];
  readonly strokes: readonly (Stroke | DeskStroke)[];
  readonly marks: readonly (Mark | DeskMark)[];
  readonly scale?: Scale | null;
  /** False for those who may look only: every command then does nothing. */
  readonly canEdit: boolean;
  readonly newId?: () => string;
}

/** What a press on the picture is for. */
export type DeskTask =
  | { readonly kind: 'look' }
  | { readonly kind: 'place'; readonly arm: Arm; readonly joint: Joint }
  | { readonly kind: 'plumb' };

/**
 * The Desk of one clip: where the coach is, what is on the clip, what it reads, and every command. Plain signals: no
 * element, no request, no injector. Commands that can be refused answer false and say why in `spoken`.
 *
 * - `marking`: joints (place, preview while dragging, commit, nudge, remove)
 * - `events`: strokes (set an event on the frame, breath, remove)
 * - `setUp`: plumb and facts of the clip
 * - `scale`: known length or rectangle, and the measuring line
 * - `view`: cautions of the camera's view
 * - `play`: whether the clip is to play
 * - `readings`: angles and measures of all marks and strokes
 */
export class DeskState {
  readonly frameTimesUs: Signal<readonly number[]>;
  readonly canEdit: boolean;
  readonly marking: Marking;
  readonly events: StrokeCommands;
  readonly setUp: SetUpCommands;
  readonly scale: ScaleCommands;
  readonly view: DeskView;
  readonly play = new DeskPlay();
  readonly readings: DeskReadings;

  /** The clip with plumb and facts as they are now (the plumb also while it is dragged). */
  readonly clip: Signal<Clip>;
  readonly frame: Signal<number>;
  readonly arm: Signal<Arm>;
  readonly joint: Signal<Joint>;
  readonly strokes: Signal<readonly DeskStroke[]>;
  /** By `markKey(arm, frame)`, drafts included, with what is being dragged as it looks now. */
  readonly marks: Signal<ReadonlyMap<string, DeskMark>>;
  readonly plumb: DeskFilm['plumb'];
  /** True while the picture's own vertical stands in for a plumb. */
  readonly plumbAssumed: Signal<boolean>;
  /** The chosen arm's stroke that the frame lies in. */
  readonly currentStroke: Signal<DeskStroke | null>;
  readonly task: Signal<DeskTask>;
  /** The last sentence said to the person. */
  readonly spoken: DeskCore['spoken'];
  readonly undoWords: Signal<string | null>;
  readonly redoWords: Signal<string | null>;

  /** Both arms' readings on the shown frame. */
  readonly readingAtFrame: Signal<Readonly<Record<Arm, FrameReading>>>;
  /** The current stroke with its measures; null between strokes and for drafts. */
  readonly strokeReading: Signal<StrokeReading | null>;
  readonly stripStrokes: Signal<readonly StripStroke[]>;
  readonly stripMarks: Signal<readonly StripMark[]>;

  private readonly film: DeskFilm;
  private readonly place: DeskPlace;
  private readonly history = new DeskHistory();
  private readonly core: DeskCore;

  constructor(input: DeskInput) {
    this.canEdit = input.canEdit;
    this.frameTimesUs = signal(input.frameTimesUs).asReadonly();
    const film = new DeskFilm(
      input.clip,
      input.strokes.map(toDeskStroke),
      input.marks.map(toDeskMark),
      input.scale,
    );
    const place = new DeskPlace(this.frameTimesUs);
    const core = new DeskCore(film, place, this.history, input.canEdit);
    [this.film, this.place, this.core] = [film, place, core];
    this.marking = new Marking(core);
    this.events = new StrokeCommands(core, input.newId ?? (() => crypto.randomUUID()));
    this.setUp = new SetUpCommands(core);
    [this.clip, this.strokes, this.marks, this.plumb] = [film.clip, film.strokes, film.marks, film.plumb];
    [this.frame, this.arm, this.joint] = [place.frame, place.arm, place.joint];
    this.spoken = core.spoken;
    [this.undoWords, this.redoWords] = [this.history.undoWords, this.history.redoWords];
    this.currentStroke = this.events.current;
    const readings = new DeskReadings({
      clip: film.clip,
      timesUs: this.frameTimesUs,
      marks: film.marks,
      strokes: film.strokes,
    });
    this.readings = readings;
    this.scale = new ScaleCommands(core, readings.context);
    this.view = new DeskView({
      clip: film.clip,
      readings,
      frame: place.frame,
      arm: place.arm,
      stroke: this.currentStroke,
      scale: this.scale.fitted,
    });

    this.play.setSpeed(DeskPlay.suiting(input.clip.captureRateFactor));
    this.plumbAssumed = computed(() => film.plumb() === null);
    this.task = computed(() => this.taskNow());
    this.readingAtFrame = computed(() => ({
      left: readings.read(this.markAt('left', place.frame())),
      right: readings.read(this.markAt('right', place.frame())),
    }));
    this.strokeReading = computed(() => this.readStroke());
    this.stripStrokes = computed(() => film.strokes().map((stroke) => this.onStrip(stroke)));
    this.stripMarks = computed(() => {
      const { left, right } = readings.completeMarks();
      return [...left, ...right].map(({ arm, frame }) => ({ arm, frame }));
    });
  }

  /** The mark of an arm on a frame as it looks now, drafts included; null where there is none. */
  markAt(arm: Arm, frame: number): DeskMark | null {
    return this.film.marks().get(markKey(arm, frame)) ?? null;
  }

  /** Where Enter would put the joint down; null until it was moved by keyboard. */
  get crosshair(): DeskPlace['crosshair'] {
    return this.place.crosshair;
  }

  /** Goes to a frame by the coach's wish: stops playing. */
  goTo(frame: number): void {
    this.play.stop();
    this.showFrame(frame);
  }

  step(by: number): void {
    this.goTo(this.place.frame() + by);
  }

  /** Moves along while playing. A joint that is being dragged stays on its frame. */
  showFrame(frame: number): void {
    if (frame === this.place.frame()) return;
    this.film.show(null);
    this.history.close();
    this.place.setFrame(frame);
    this.marking.startAtMissing();
  }

  chooseArm(arm: Arm): void {
    if (arm === this.place.arm()) return;
    this.place.setArm(arm);
    this.marking.startAtMissing();
    this.history.close();
  }

  chooseJoint(joint: Joint, arm: Arm = this.place.arm()): void {
    this.place.setArm(arm);
    this.place.setJoint(joint);
    this.history.close();
  }

  /** N: leads to the next frame that the arm's strokes still need marked. */
  nextFrameToMark(): boolean {
    const next = nextToMark(this.progress(), this.place.arm(), this.place.frame());
    if (!next) return this.nothingLeft();
    this.goTo(next.frame);
    this.chooseArm(next.stroke.arm);
    const name = nameStroke(this.strokes(), next.stroke);
    return this.core.say(`${name}, ${needWords[next.need]}: frame ${next.frame}.`);
  }

  /** To the nearest marked frame of the chosen arm before or after the shown one. */
  goToMarked(way: 1 | -1): boolean {
    const frames = this.readings.completeMarks()[this.place.arm()].map(({ frame }) => frame);
    const [here, arm] = [this.place.frame(), this.place.arm()];
    const next = way === 1 ? frames.find((frame) => frame > here) : frames.findLast((frame) => frame < here);
    if (next === undefined) {
      return this.core.refuse(`No ${arm} mark ${way === 1 ? 'after' : 'before'} this frame.`);
    }
    this.goTo(next);
    return true;
  }

  /** Where a clip is opened when no frame is asked for: the first catch, so that a worked-on clip shows its readings. */
  goToFirstCatch(): void {
    const first = this.strokes().find(isWhole);
    if (!first) return;
    this.chooseArm(first.arm);
    this.goTo(first.catch);
  }

  /** Frames that a stroke still needs marked, with what for. */
  stillToMark(stroke: DeskStroke): ReturnType<typeof stillToMark> {
    return stillToMark(stroke, this.progress());
  }

  undo(): boolean {
    const step = this.canEdit ? this.history.undo() : null;
    if (!step) return this.core.refuse('Nothing to undo.');
    this.core.replay(step.changes);
    this.goBackTo(step.place);
    return this.core.say(`Undone: ${step.words}.`);
  }

  redo(): boolean {
    const step = this.canEdit ? this.history.redo() : null;
    if (!step) return this.core.refuse('Nothing to redo.');
    this.core.replay(step.changes);
    this.goBackTo(step.place);
    return this.core.say(`Done again: ${step.words}.`);
  }

  /** Changes that are not the coach's own (kept on the device, or another's version): no history, not saved again. */
  takeIn(changes: Parameters<ChangeListener>[0]): void {
    this.film.apply(changes);
  }

  /** Reads every mark with another spread, as the server does from now on. */
  takeSpread(spread: Clip['jointUncertaintyPx']): void {
    this.film.takeSpread(spread);
  }

  /** Called with every change to save; answers how to stop. */
  onChange(listener: ChangeListener): () => void {
    return this.core.listen(listener);
  }

  say(words: string): void {
    this.core.say(words);
  }

  private goBackTo(place: { readonly frame: number; readonly arm: Arm }): void {
    this.goTo(place.frame);
    this.place.setArm(place.arm);
  }

  private taskNow(): DeskTask {
    if (!this.canEdit || this.play.playing()) return { kind: 'look' };
    if (this.setUp.drawingPlumb()) return { kind: 'plumb' };
    if (this.scale.placing()) return { kind: 'look' };
    const joint = this.marking.missing();
    return joint === null ? { kind: 'look' } : { kind: 'place', arm: this.arm(), joint };
  }

  private progress(): Progress {
    const { left, right } = this.readings.completeMarks();
    return {
      strokes: this.strokes(),
      timesUs: this.frameTimesUs(),
      marked: { left: left.map(({ frame }) => frame), right: right.map(({ frame }) => frame) },
      midPullUs: (id) => {
        const midPull = this.readings.measures().get(id)?.midPull;
        return midPull?.ok ? midPull.value.timeUs : null;
      },
    };
  }

  private nothingLeft(): boolean {
    const current = this.currentStroke();
    if (this.strokes().length === 0) {
      return this.core.refuse('Set the events of a stroke first; then this leads to the frames to mark.');
    }
    if (current && this.stillToMark(current).some(({ frame }) => frame === this.frame())) {
      return this.core.refuse('This frame is the last one that is missing.');
    }
    return this.core.refuse('Every stroke with its events is marked.');
  }

  private readStroke(): StrokeReading | null {
    const stroke = this.currentStroke();
    const measures = stroke && this.readings.measures().get(stroke.id);
    if (!stroke || !measures) return null;
    return { name: nameStroke(this.strokes(), stroke), breath: stroke.breath, measures };
  }

  private onStrip(stroke: DeskStroke): StripStroke {
    const measures = this.readings.measures().get(stroke.id);
    const curve = measures?.forearmCurve ?? [];
    return { ...stroke, midPull: measures?.midPull.ok ? measures.midPull.value.frame : null, curve };
  }
}

function toDeskStroke(stroke: Stroke | DeskStroke): DeskStroke {
  return 'version' in stroke ? deskStrokeOf(stroke) : stroke;
}

function toDeskMark({ arm, frame, shoulder, elbow, wrist }: Mark | DeskMark): DeskMark {
  return { arm, frame, shoulder, elbow, wrist };
}
