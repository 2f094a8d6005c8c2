import type { Signal } from '@angular/core';
import type { ArmMark, ArmSide, Joint } from '@stillstroke/geometry/arm';
import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import type { VideoPoint } from '@stillstroke/geometry/points/video-point';
import type { PlaySpeed } from '../../playback/player';
import type { Task } from '../tools/tool-port';
import type { Joints } from './arm-figure';
import type { Size } from './spaces';

/** One arm on a frame: a whole mark, or the joints placed so far. */
export interface StageArm {
  readonly arm: ArmSide;
  readonly joints: Joints;
  /** What someone else saved for the same mark meanwhile, when the two must be settled. */
  readonly theirs: ArmMark | null;
}

/** Whether and how the clip is to play. The Desk's controls write it, the stage plays by it. */
export interface StagePlay {
  readonly playing: Signal<boolean>;
  readonly direction: Signal<1 | -1>;
  /** Share of the world's speed. */
  readonly speed: Signal<PlaySpeed>;
  /** Frames come later than they are due: the clip plays slower than asked, with no frame left out. */
  readonly behind: Signal<boolean>;
  stop(): void;
  setBehind(behind: boolean): void;
}

/**
 * What the stage draws and changes. Frames are 0-based, points are of the picture as shown, angles in degrees. The frame
 * asked for and the shown one differ until its picture is there: marks drawn are the shown frame's, and nothing can be
 * placed or moved meanwhile.
 */
export interface StageState {
  readonly clipId: Signal<string>;
  /** Presentation times as the server knows them, whole microseconds; the browser's index must agree. */
  readonly timesUs: Signal<readonly number[]>;
  readonly picture: Signal<Size>;
  readonly play: StagePlay;
  /** World seconds per file second. */
  readonly captureRateFactor: Signal<number>;
  /** The frame that is asked for. */
  readonly frame: Signal<number>;
  /** The chosen arm. */
  readonly arm: Signal<ArmSide>;
  /** The chosen joint of the chosen arm. */
  readonly joint: Signal<Joint>;
  /** What a press on the picture is for. */
  readonly task: Signal<Task>;
  /** What is on an arm on the shown frame, with what is being dragged already in its new place; null for nothing. */
  armOn(arm: ArmSide): StageArm | null;
  /** The chosen arm's angles on the shown frame; null while it has no whole mark. */
  readonly angles: Signal<{ readonly forearmDeg: number; readonly elbowDeg: number } | null>;
  /** The chosen arm's marks on neighbouring marked frames, nearest first. */
  readonly neighbours: Signal<readonly ArmMark[]>;
  /** The clip's vertical, with what is being drawn already in its new place. */
  readonly plumb: Signal<PlumbLine | null>;
  /** Where the keyboard would put the next joint down. */
  readonly crosshair: Signal<VideoPoint>;
  /** Another value each time the keyboard moves it; null until then. */
  readonly crosshairMoved: Signal<VideoPoint | null>;
  /** Where the shown frame lies in a stroke of the chosen arm, such as "right pull, 38 %"; empty when in none. */
  readonly place: Signal<string>;
  /** Whether joints can be taken hold of at the moment. */
  readonly canEdit: Signal<boolean>;

  chooseJoint(arm: ArmSide, joint: Joint): void;
  /** Puts the next missing joint of the chosen arm down. */
  placeJoint(point: VideoPoint): void;
  /** Shows a joint elsewhere without saving. */
  previewJoint(arm: ArmSide, joint: Joint, point: VideoPoint): void;
  /** Makes what is previewed one undo step. */
  commitJoint(arm: ArmSide, joint: Joint): void;
  dropPreview(): void;
  /** Shows a plumb without saving; null shows the clip's own again. */
  previewPlumb(plumb: PlumbLine | null): void;
  savePlumb(plumb: PlumbLine): void;
  /** Leaves the plumb as it was and ends drawing it. */
  stopPlumb(): void;
  /** The way on from a frame that cannot be shown: by the person's wish. */
  goTo(frame: number): void;
  /** Moves along while playing. */
  showFrame(frame: number): void;
}
