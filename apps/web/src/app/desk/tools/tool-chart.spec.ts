import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import { beforeEach, describe, expect, it } from 'vitest';
import { asPicturePoint, type PicturePoint, picturePoint, stagePoint } from '../stage/spaces';
import {
  fitView,
  toPicture,
  toStage,
  type ViewFrame,
  type ViewTransform,
  zoomAt,
} from '../stage/view-transform';
import { nextToolState, type ToolEvent } from './tool-chart';
import type { JointHandle, PointerKind, Task, ToolPointer, ToolPort } from './tool-port';
import { restingState, type ToolState } from './tool-state';

/** A desk that does what it is told and writes it down. */
class RecordingDesk implements ToolPort {
  readonly viewFrame: ViewFrame = {
    picture: { width: 1920, height: 1080 },
    stage: { width: 960, height: 540 },
  };
  currentView: ViewTransform = fitView(this.viewFrame);
  currentTask: Task = { kind: 'look' };
  handles: JointHandle[] = [];
  drawnPlumb: PlumbLine | null = null;
  readonly calls: string[] = [];
  readonly placed: PicturePoint[] = [];
  previewed: PicturePoint | null = null;
  committedPlumb: PlumbLine | null = null;
  inspected: PicturePoint | null = null;
  hovered: JointHandle | null = null;

  view = () => this.currentView;
  frame = () => this.viewFrame;
  task = () => this.currentTask;
  joints = () => this.handles;
  plumb = () => this.drawnPlumb;
  setView(view: ViewTransform) {
    this.currentView = view;
  }
  hover(joint: JointHandle | null) {
    this.hovered = joint;
  }
  chooseJoint(handle: JointHandle) {
    this.calls.push(`choose ${handle.arm} ${handle.joint}`);
  }
  placeJoint(point: PicturePoint) {
    this.calls.push('place');
    this.placed.push(point);
  }
  previewJoint(_: JointHandle, point: PicturePoint) {
    this.previewed = point;
  }
  commitJoint() {
    this.calls.push('commit');
  }
  dropPreview() {
    this.calls.push('drop');
    this.previewed = null;
  }
  previewPlumb(plumb: PlumbLine | null) {
    this.drawnPlumb = plumb;
  }
  commitPlumb(plumb: PlumbLine) {
    this.committedPlumb = plumb;
  }
  inspect(point: PicturePoint | null) {
    this.inspected = point;
  }
}

let desk: RecordingDesk;
let state: ToolState;

beforeEach(() => {
  desk = new RecordingDesk();
  state = { name: 'idle' };
});

function send(event: ToolEvent) {
  state = nextToolState(state, event, desk);
}

function pointerAt(x: number, y: number, more: Partial<ToolPointer> = {}): ToolPointer {
  return { id: 1, kind: 'mouse', at: stagePoint(x, y), pans: false, ...more };
}

const press = (x: number, y: number, more?: Partial<ToolPointer>) => {
  send({ kind: 'press', pointer: pointerAt(x, y, more) });
};
const move = (x: number, y: number, more?: Partial<ToolPointer>) => {
  send({ kind: 'move', pointer: pointerAt(x, y, more) });
};
const release = (x: number, y: number, more?: Partial<ToolPointer>) => {
  send({ kind: 'release', pointer: pointerAt(x, y, more) });
};

const elbow: JointHandle = { arm: 'right', joint: 'elbow', point: picturePoint(400, 600) };

describe('placing joints', () => {
  beforeEach(() => {
    desk.currentTask = { kind: 'place', arm: 'right', joint: 'shoulder' };
    send({ kind: 'task' });
  });

  it('puts the joint down where the pointer is released, at fit and zoomed in', () => {
    press(100, 50);
    move(200.5, 150.25);
    release(200.5, 150.25);
    expect(desk.placed).toEqual([picturePoint(401, 300.5)]);
    desk.currentView = zoomAt(desk.currentView, desk.viewFrame, stagePoint(300, 200), 16);
    const wanted = picturePoint(612.3, 401.7);
    const at = toStage(desk.currentView, wanted);
    press(at.x, at.y);
    release(at.x, at.y);
    expect(desk.placed[1]?.x).toBeCloseTo(wanted.x, 9);
    expect(desk.placed[1]?.y).toBeCloseTo(wanted.y, 9);
  });

  it('shows the pixels under the pointer before and during the press, and puts the loupe away after it', () => {
    move(10, 20);
    expect(desk.inspected).toEqual(picturePoint(20, 40));
    press(10, 20);
    move(11, 20);
    expect(desk.inspected).toEqual(picturePoint(22, 40));
    release(11, 20);
    expect(desk.inspected).toBeNull();
  });

  it('keeps a joint inside the picture when the pointer leaves it', () => {
    press(100, 50);
    release(-40, 900);
    expect(desk.placed).toEqual([picturePoint(0, 1080)]);
  });

  it('places nothing after Escape', () => {
    press(100, 50);
    send({ kind: 'cancel' });
    release(100, 50);
    expect(desk.calls).toEqual([]);
  });

  it('waits for the next joint, and for none when the mark is whole', () => {
    press(1, 1);
    desk.currentTask = { kind: 'place', arm: 'right', joint: 'elbow' };
    release(1, 1);
    expect(state).toMatchObject({ name: 'placing-joint', joint: 'elbow', pressed: null });
    press(50, 50);
    desk.currentTask = { kind: 'look' };
    release(50, 50);
    expect(state.name).toBe('idle');
  });

  it('takes hold of a joint of the same arm that is already down, but not of the other arm', () => {
    desk.handles = [elbow];
    press(200, 300);
    expect(state.name).toBe('dragging-joint');
    send({ kind: 'cancel' });
    desk.handles = [{ ...elbow, arm: 'left' }];
    press(200, 300);
    expect(state.name).toBe('placing-joint');
  });

  it('moves the picture with the middle button or the pan key instead', () => {
    desk.currentView = zoomAt(desk.currentView, desk.viewFrame, stagePoint(480, 270), 4);
    const before = desk.currentView;
    press(100, 100, { pans: true });
    move(110, 95, { pans: true });
    release(110, 95, { pans: true });
    expect(desk.currentView.offsetX - before.offsetX).toBeCloseTo(10, 9);
    expect(desk.currentView.offsetY - before.offsetY).toBeCloseTo(-5, 9);
    expect(desk.calls).toEqual([]);
  });

  it('turns a press into moving and zooming when a second finger comes, and places nothing', () => {
    press(400, 200, { kind: 'touch' });
    press(500, 300, { kind: 'touch', id: 2 });
    const under = toPicture(desk.currentView, stagePoint(400, 200));
    move(600, 400, { kind: 'touch', id: 2 });
    expect(desk.currentView.scale).toBeCloseTo(1, 9);
    expect(toStage(desk.currentView, under).x).toBeCloseTo(400, 6);
    release(600, 400, { kind: 'touch', id: 2 });
    release(400, 200, { kind: 'touch' });
    expect(desk.calls).toEqual([]);
    expect(state.name).toBe('placing-joint');
  });
});

describe('dragging a joint', () => {
  beforeEach(() => {
    desk.handles = [elbow];
  });

  it('keeps the distance to the pointer and saves once, at release', () => {
    press(205, 303);
    move(215, 313);
    expect(desk.previewed).toEqual(picturePoint(420, 620));
    move(225.5, 303);
    release(225.5, 303);
    expect(desk.previewed).toEqual(picturePoint(441, 600));
    expect(desk.calls).toEqual(['choose right elbow', 'commit']);
    expect(state.name).toBe('idle');
  });

  it('only chooses the joint when the pointer does not leave the spot', () => {
    press(205, 303);
    move(206, 303);
    release(206, 303);
    expect(desk.calls).toEqual(['choose right elbow']);
    expect(desk.previewed).toBeNull();
  });

  it('puts everything back on Escape', () => {
    press(200, 300);
    move(260, 300);
    send({ kind: 'cancel' });
    expect(desk.calls).toEqual(['choose right elbow', 'drop']);
    expect(desk.inspected).toBeNull();
  });

  it('ignores other pointers', () => {
    press(200, 300);
    move(400, 400, { id: 7 });
    release(400, 400, { id: 7 });
    expect(state.name).toBe('dragging-joint');
    expect(desk.previewed).toBeNull();
  });

  it('holds on when the task changes meanwhile', () => {
    press(200, 300);
    desk.currentTask = { kind: 'place', arm: 'left', joint: 'shoulder' };
    send({ kind: 'task' });
    expect(state.name).toBe('dragging-joint');
    release(200, 300);
    expect(state.name).toBe('placing-joint');
  });

  it.each<[PointerKind, number, ToolState['name']]>([
    ['mouse', 11.9, 'dragging-joint'],
    ['mouse', 12.1, 'panning'],
    ['touch', 21.9, 'dragging-joint'],
    ['touch', 22.1, 'panning'],
  ])('takes hold with a %s from %f px away: %s', (kind, away, name) => {
    press(200 + away, 300, { kind });
    expect(state.name).toBe(name);
  });

  it('takes the nearest of two joints within reach', () => {
    desk.handles = [elbow, { arm: 'left', joint: 'wrist', point: picturePoint(410, 600) }];
    move(206, 300);
    expect(desk.hovered?.joint).toBe('wrist');
  });
});

describe('moving the picture', () => {
  it('follows a drag on an empty place when nothing is missing', () => {
    desk.currentView = zoomAt(desk.currentView, desk.viewFrame, stagePoint(480, 270), 4);
    const under = toPicture(desk.currentView, stagePoint(300, 300));
    press(300, 300);
    move(333, 280);
    expect(toStage(desk.currentView, under).x).toBeCloseTo(333, 9);
    expect(toStage(desk.currentView, under).y).toBeCloseTo(280, 9);
    release(333, 280);
    expect(state.name).toBe('idle');
  });
});

describe('drawing the plumb', () => {
  beforeEach(() => {
    desk.currentTask = { kind: 'plumb' };
    state = restingState(desk);
  });

  it('is drawn by a drag, whichever way, and is saved with its upper end as top', () => {
    press(100, 400);
    move(98, 100);
    release(98, 100);
    expect(desk.committedPlumb).toEqual({ top: picturePoint(196, 200), bottom: picturePoint(200, 800) });
  });

  it('moves the end that is taken hold of and leaves the other', () => {
    desk.drawnPlumb = { top: picturePoint(200, 100), bottom: picturePoint(200, 900) };
    press(100, 50);
    release(110, 50);
    expect(desk.committedPlumb).toEqual({ top: picturePoint(220, 100), bottom: picturePoint(200, 900) });
  });

  it('drops a mere click and a level line', () => {
    press(100, 100);
    release(101, 101);
    expect(desk.committedPlumb).toBeNull();
    press(100, 100);
    release(400, 101);
    expect(desk.committedPlumb).toBeNull();
    expect(desk.drawnPlumb).toBeNull();
  });

  it('is as before after Escape', () => {
    press(100, 100);
    move(100, 300);
    expect(desk.drawnPlumb).not.toBeNull();
    send({ kind: 'cancel' });
    expect(desk.drawnPlumb).toBeNull();
    expect(state).toEqual({ name: 'drawing-plumb', held: null });
  });

  it('keeps both ends of a plumb as points of the picture', () => {
    press(10, 10);
    release(10, 300);
    expect(desk.committedPlumb && asPicturePoint(desk.committedPlumb.bottom)).toEqual(picturePoint(20, 600));
  });
});
