import { computed, type Signal } from '@angular/core';
import type { ArmMark, ArmSide, FrameMark, Joint } from '@stillstroke/geometry/arm';
import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import type { VideoPoint } from '@stillstroke/geometry/points/video-point';
import type { DeskMark } from '../state/desk-mark';
import type { DeskState } from '../state/desk-state';
import { strokeAt } from '../state/desk-stroke';
import type { Task } from '../tools/tool-port';
import { JOINTS, type Joints } from './arm-figure';
import type { Size } from './spaces';
import type { StageArm, StagePlay, StageState } from './stage-state';
import { strokePlace } from './stroke-place';

/** A mark as someone else saved it meanwhile. */
export interface TheirMark extends FrameMark {
  readonly arm: ArmSide;
}

const LOOK: Task = { kind: 'look' };

/** The Desk as the stage sees it. */
export class DeskStage implements StageState {
  readonly clipId: Signal<string>;
  readonly timesUs: Signal<readonly number[]>;
  readonly picture: Signal<Size>;
  readonly play: StagePlay;
  readonly captureRateFactor: Signal<number>;
  readonly frame: Signal<number>;
  readonly arm: Signal<ArmSide>;
  readonly joint: Signal<Joint>;
  readonly task: Signal<Task>;
  readonly plumb: Signal<PlumbLine | null>;
  readonly crosshair: Signal<VideoPoint>;
  readonly crosshairMoved: Signal<VideoPoint | null>;
  readonly angles: StageState['angles'];
  readonly neighbours: Signal<readonly ArmMark[]>;
  readonly place: Signal<string>;
  readonly canEdit: Signal<boolean>;
  private readonly sides: Readonly<Record<ArmSide, Signal<StageArm | null>>>;

  constructor(
    private readonly desk: DeskState,
    private readonly theirs: Signal<readonly TheirMark[]>,
    shownFrame: Signal<number | null>,
  ) {
    const { clip, frame, arm } = desk;
    const shown = computed(() => shownFrame() ?? frame());
    const upToDate = computed(() => shown() === frame());
    this.clipId = computed(() => clip().id);
    this.picture = computed(() => ({ width: clip().width, height: clip().height }), { equal: sameSize });
    [this.frame, this.arm, this.joint] = [frame, arm, desk.joint];
    [this.timesUs, this.plumb] = [desk.frameTimesUs, desk.plumb];
    this.task = computed(() => (upToDate() ? desk.task() : LOOK));
    [this.play, this.crosshairMoved] = [desk.play, desk.crosshair];
    this.captureRateFactor = computed(() => desk.clip().captureRateFactor);
    this.crosshair = computed(() => desk.marking.crosshairOrMiddle());
    this.canEdit = computed(() => desk.canEdit && upToDate() && !desk.play.playing());
    this.sides = {
      left: computed(() => this.readArm('left', shown()), { equal: sameArm }),
      right: computed(() => this.readArm('right', shown()), { equal: sameArm }),
    };
    this.angles = computed(() => {
      const reading = desk.readings.read(desk.markAt(arm(), shown()));
      return reading.ok ? reading.value.angles : null;
    });
    this.neighbours = computed(() => nearestMarks(desk.readings.completeMarks()[arm()], shown()));
    this.place = computed(() =>
      strokePlace(strokeAt(desk.strokes(), arm(), shown()), shown(), desk.frameTimesUs()),
    );
  }

  armOn(arm: ArmSide): StageArm | null {
    return this.sides[arm]();
  }

  chooseJoint(arm: ArmSide, joint: Joint): void {
    this.desk.chooseJoint(joint, arm);
  }

  placeJoint(point: VideoPoint): void {
    this.desk.marking.placeJoint(plain(point));
  }

  previewJoint(arm: ArmSide, joint: Joint, point: VideoPoint): void {
    this.desk.marking.previewJoint(arm, this.frame(), joint, plain(point));
  }

  commitJoint(arm: ArmSide, joint: Joint): void {
    this.desk.marking.commitMark(arm, this.frame(), undefined, 'move-joint', joint);
  }

  dropPreview(): void {
    this.desk.marking.dropPreview();
  }

  previewPlumb(plumb: PlumbLine | null): void {
    this.desk.setUp.previewPlumb(plumb && { top: plain(plumb.top), bottom: plain(plumb.bottom) });
  }

  savePlumb({ top, bottom }: PlumbLine): void {
    this.desk.setUp.setPlumb({ top: plain(top), bottom: plain(bottom) });
  }

  stopPlumb(): void {
    this.desk.setUp.stopPlumb();
  }

  goTo(frame: number): void {
    this.desk.goTo(frame);
  }

  showFrame(frame: number): void {
    this.desk.showFrame(frame);
  }

  private readArm(side: ArmSide, frame: number): StageArm | null {
    const joints = jointsOf(this.desk.markAt(side, frame));
    const theirs = this.theirs().find((mark) => mark.arm === side && mark.frame === frame) ?? null;
    return joints || theirs ? { arm: side, joints: joints ?? {}, theirs } : null;
  }
}

/** The same joints in the same places: nothing to draw anew. */
function sameArm(a: StageArm | null, b: StageArm | null): boolean {
  if (!a || !b) return a === b;
  return (
    a.theirs === b.theirs &&
    JOINTS.every(
      (joint) => a.joints[joint]?.x === b.joints[joint]?.x && a.joints[joint]?.y === b.joints[joint]?.y,
    )
  );
}

/** Null for a mark without joints. */
function jointsOf(mark: DeskMark | null): Joints | null {
  if (!mark) return null;
  const placed = JOINTS.flatMap((joint) => {
    const point = mark[joint];
    return point ? [[joint, point] as const] : [];
  });
  return placed.length > 0 ? Object.fromEntries(placed) : null;
}

function nearestMarks(marks: readonly FrameMark[], frame: number): readonly FrameMark[] {
  const away = (mark: FrameMark) => Math.abs(mark.frame - frame);
  return marks.filter((mark) => mark.frame !== frame).sort((a, b) => away(a) - away(b));
}

/** What goes to the server carries coordinates and nothing else. */
function plain({ x, y }: VideoPoint): { x: number; y: number } {
  return { x, y };
}

function sameSize(a: Size, b: Size): boolean {
  return a.width === b.width && a.height === b.height;
}
