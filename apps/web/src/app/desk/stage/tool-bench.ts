import { computed, signal, type Signal } from '@angular/core';
import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import { isHeld, nextToolState, type ToolEvent } from '../tools/tool-chart';
import type { JointHandle, Task, ToolPointer, ToolPort } from '../tools/tool-port';
import type { ToolState } from '../tools/tool-state';
import { JOINTS } from './arm-figure';
import { asPicturePoint, type PicturePoint } from './spaces';
import type { StageController } from './stage-controller';
import type { StageState } from './stage-state';
import type { ViewTransform } from './view-transform';

/** What the loupe is to show, and the pointer that it must keep clear of; null for the keyboard's crosshair. */
export interface Inspected {
  readonly point: PicturePoint;
  readonly pointer: ToolPointer | null;
}

/** Runs the tools on the Desk's state: events in, signals out. */
export class ToolBench implements ToolPort {
  private readonly stateNow = signal<ToolState>({ name: 'idle' });
  private readonly hoveredNow = signal<JointHandle | null>(null);
  private readonly inspectedNow = signal<Inspected | null>(null);

  readonly tool = this.stateNow.asReadonly();
  readonly hovered = this.hoveredNow.asReadonly();
  readonly inspected = this.inspectedNow.asReadonly();
  readonly held = computed(() => isHeld(this.stateNow()));
  /** What a press is for; its change puts another tool at rest. */
  readonly taskNow: Signal<Task>;

  constructor(
    private readonly state: StageState,
    private readonly controller: StageController,
  ) {
    this.taskNow = computed(() => state.task(), { equal: sameTask });
  }

  send(event: ToolEvent): void {
    this.stateNow.set(nextToolState(this.stateNow(), event, this));
  }

  view = (): ViewTransform => this.controller.view();
  frame = () => this.controller.frame();
  task = (): Task => this.taskNow();

  joints(): readonly JointHandle[] {
    if (!this.state.canEdit()) return [];
    const chosen = this.state.arm();
    const sides = chosen === 'left' ? (['left', 'right'] as const) : (['right', 'left'] as const);
    const arms = sides.flatMap((side) => this.state.armOn(side) ?? []);
    return arms.flatMap(({ arm, joints }) =>
      JOINTS.flatMap((joint) => {
        const point = joints[joint];
        return point ? [{ arm, joint, point: asPicturePoint(point) }] : [];
      }),
    );
  }

  plumb(): PlumbLine | null {
    return this.state.plumb();
  }

  setView(view: ViewTransform): void {
    this.controller.setView(view);
  }

  hover(joint: JointHandle | null): void {
    const before = this.hoveredNow();
    if (before?.arm !== joint?.arm || before?.joint !== joint?.joint) this.hoveredNow.set(joint);
  }

  chooseJoint({ arm, joint }: JointHandle): void {
    this.state.chooseJoint(arm, joint);
  }

  placeJoint(point: PicturePoint): void {
    this.state.placeJoint(point);
  }

  previewJoint({ arm, joint }: JointHandle, point: PicturePoint): void {
    this.state.previewJoint(arm, joint, point);
  }

  commitJoint({ arm, joint }: JointHandle): void {
    this.state.commitJoint(arm, joint);
  }

  dropPreview(): void {
    this.state.dropPreview();
  }

  previewPlumb(plumb: PlumbLine | null): void {
    this.state.previewPlumb(plumb);
  }

  commitPlumb(plumb: PlumbLine): void {
    this.state.savePlumb(plumb);
  }

  inspect(point: PicturePoint | null, pointer: ToolPointer | null): void {
    this.inspectedNow.set(point ? { point, pointer } : null);
  }
}

function sameTask(a: Task, b: Task): boolean {
  if (a.kind !== 'place' || b.kind !== 'place') return a.kind === b.kind;
  return a.arm === b.arm && a.joint === b.joint;
}
