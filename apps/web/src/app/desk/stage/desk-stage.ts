import { computed, type Signal } from '@angular/core';
import type { ArmMark, ArmSide, FrameMark, Joint } from '@stillstroke/geometry/arm';
import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import type { VideoPoint } from '@stillstroke/geometry/points/video-point';
import type { DeskMark } from '../state/desk-mark';
import type { DeskState } from '../state/desk-state';
import type { Task } from '../tools/tool-port';
import { JOINTS, type Joints } from './arm-figure';
import type { Size } from './spaces';
import type { StageArm, StagePlay, StageState } from './stage-state';
import { strokePlace } from './stroke-place';

/** A mark as someone else saved it meanwhile. */
export interface TheirMark extends FrameMark {
  readonly arm: ArmSide;
}

const ARMS: readonly ArmSide[] = ['left', 'right'];

/** The Desk as the stage sees it. */
export class DeskStage implements StageState {
  readonly clipId: Signal<string>;
  readonly timesUs: Signal<readonly number[]>;
  readonly picture: Signal<Size>;
  readonly play: StagePlay;
  readonly frame: Signal<number>;
  readonly arm: Signal<ArmSide>;
  readonly joint: Signal<Joint>;
  readonly task: Signal<Task>;
  readonly plumb: Signal<PlumbLine | null>;
  readonly crosshair: Signal<VideoPoint>;
  readonly crosshairMoved: Signal<VideoPoint | null>;
  readonly arms: Signal<readonly StageArm[]>;
  readonly angles: StageState['angles'];
  readonly neighbours: Signal<readonly ArmMark[]>;
  readonly place: Signal<string>;
  readonly canEdit: Signal<boolean>;

  constructor(
    private readonly desk: DeskState,
    theirs: Signal<readonly TheirMark[]>,
  ) {
    const { clip, frame, arm } = desk;
    this.clipId = computed(() => clip().id);
    this.picture = computed(() => ({ width: clip().width, height: clip().height }), { equal: sameSize });
    [this.frame, this.arm, this.joint] = [frame, arm, desk.joint];
    [this.timesUs, this.task, this.plumb] = [desk.frameTimesUs, desk.task, desk.plumb];
    [this.play, this.crosshairMoved] = [desk.play, desk.crosshair];
    this.crosshair = computed(() => desk.marking.crosshairOrMiddle());
    this.canEdit = computed(() => desk.canEdit && !desk.play.playing());
    this.arms = computed(() =>
      ARMS.flatMap((side) => {
        const joints = jointsOf(desk.markAt(side, frame()));
        const other = theirs().find((mark) => mark.arm === side && mark.frame === frame()) ?? null;
        return joints || other ? [{ arm: side, joints: joints ?? {}, theirs: other }] : [];
      }),
    );
    this.angles = computed(() => {
      const reading = desk.readingAtFrame()[arm()];
      return reading.ok ? reading.value.angles : null;
    });
    this.neighbours = computed(() => nearestMarks(desk.readings.completeMarks()[arm()], frame()));
    this.place = computed(() => strokePlace(desk.currentStroke(), frame(), desk.frameTimesUs()));
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
