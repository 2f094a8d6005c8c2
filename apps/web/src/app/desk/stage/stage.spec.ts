import { ChangeDetectionStrategy, Component, signal } from '@angular/core';
import { type ComponentFixture, TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { DeskState } from '../state/desk-state';
import { bareDesk, deskState, testMarks } from '../state/testing';
import { ClipOpener } from './clip-frames';
import { asPicturePoint, picturePoint, type PicturePoint } from './spaces';
import type { TheirMark } from './desk-stage';
import { Stage } from './stage';
import { StageController } from './stage-controller';
import { stageProviders } from './stage-providers';
import { levelOf, PaintedSource } from './testing';
import { toStage } from './view-transform';

@Component({
  selector: 'st-stage-host',
  imports: [Stage],
  template: `<div style="width: 800px; height: 450px">
    <st-stage [state]="state()" [theirs]="theirs()" />
  </div>`,
  providers: [stageProviders],
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class StageHost {
  readonly state = signal<DeskState>(bareDesk());
  readonly theirs = signal<readonly TheirMark[]>([]);
}

let fixture: ComponentFixture<StageHost>;
let source: PaintedSource;
let controller: StageController;

async function show(desk: DeskState, painted = new PaintedSource()): Promise<void> {
  source = painted;
  TestBed.configureTestingModule({
    providers: [{ provide: ClipOpener, useValue: { open: () => Promise.resolve(source) } }],
  });
  fixture = TestBed.createComponent(StageHost);
  fixture.componentInstance.state.set(desk);
  controller = fixture.debugElement.injector.get(StageController);
  await settle();
}

/** Until every signal is drawn: ResizeObserver and pictures answer after the frame in which they were asked. */
async function settle(): Promise<void> {
  for (let turn = 0; turn < 4; turn++) {
    await fixture.whenStable();
    await new Promise(requestAnimationFrame);
  }
}

function element<E extends HTMLElement>(selector: string): E {
  const found = (fixture.nativeElement as HTMLElement).querySelector<E>(selector);
  if (!found) throw new Error(`no ${selector}`);
  return found;
}

function fire(type: string, point: PicturePoint, init: PointerEventInit = {}): void {
  const target = element('.pointers');
  const { left, top } = target.getBoundingClientRect();
  const at = toStage(controller.view(), point);
  // Constructed events have no live pointer to capture.
  target.setPointerCapture = () => undefined;
  target.dispatchEvent(
    new PointerEvent(type, {
      bubbles: true,
      cancelable: true,
      pointerId: 1,
      pointerType: 'mouse',
      clientX: left + at.x,
      clientY: top + at.y,
      ...init,
    }),
  );
}

async function click(point: PicturePoint): Promise<void> {
  fire('pointermove', point);
  fire('pointerdown', point);
  fire('pointerup', point);
  await settle();
}

/** The pixel at a picture point on a sheet of marks: 0 is the resting one, 1 the moving one. */
function drawnAt(layer: 0 | 1, point: PicturePoint): readonly [number, number, number, number] {
  const canvas = (fixture.nativeElement as HTMLElement).querySelectorAll<HTMLCanvasElement>(
    '.konvajs-content canvas',
  )[layer];
  const context = canvas?.getContext('2d');
  if (!canvas || !context) throw new Error('no marks');
  const ratio = canvas.width / 800;
  const at = toStage(controller.view(), point);
  const [x, y] = [Math.round(at.x * ratio), Math.round(at.y * ratio)];
  const { data } = context.getImageData(x, y, 1, 1);
  return [data[0] ?? 0, data[1] ?? 0, data[2] ?? 0, data[3] ?? 0];
}

function pictureAt(point: PicturePoint): number {
  const canvas = element<HTMLCanvasElement>('canvas.sheet');
  const at = toStage(controller.view(), point);
  const ratio = canvas.width / 800;
  const pixel = canvas
    .getContext('2d')
    ?.getImageData(Math.floor(at.x * ratio), Math.floor(at.y * ratio), 1, 1);
  return pixel?.data[0] ?? -1;
}

afterEach(() => {
  fixture.destroy();
});

describe('the picture', () => {
  it('is the frame that the caption names', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.goTo(7);
    await settle();
    expect(element('.caption').textContent).toContain('Frame 7 of 300');
    expect(Math.abs(pictureAt(picturePoint(640, 360)) - levelOf(7))).toBeLessThanOrEqual(2);
  });

  it('stays, with its own number, until the next one is there', async () => {
    const desk = bareDesk();
    await show(desk);
    source.hold();
    desk.goTo(9);
    await settle();
    await new Promise((resolve) => setTimeout(resolve, 200));
    await settle();
    expect(element('.caption').textContent).toContain('Frame 0 of 300');
    expect(element('.loading').textContent).toContain('Loading frame 9');
    expect(Math.abs(pictureAt(picturePoint(640, 360)) - levelOf(0))).toBeLessThanOrEqual(2);
    source.letGo();
    await settle();
    expect(element('.caption').textContent).toContain('Frame 9 of 300');
    expect((fixture.nativeElement as HTMLElement).querySelector('.loading')).toBeNull();
  });

  it('keeps its own marks with it, and lets nothing be placed on a frame that is not seen', async () => {
    const desk = deskState({ marks: testMarks.filter(({ arm, frame }) => arm === 'right' && frame === 84) });
    const elbow = asPicturePoint(desk.markAt('right', 84)?.elbow ?? { x: NaN, y: NaN });
    await show(desk);
    desk.goTo(84);
    await settle();
    source.hold();
    desk.goTo(90);
    await settle();
    expect(drawnAt(1, elbow)[3]).toBeGreaterThan(240);
    expect(element('.words').textContent).toContain('Right arm: forearm 40°');
    await click(picturePoint(300, 300));
    expect(desk.markAt('right', 90)).toBeNull();
    source.letGo();
    await settle();
    expect(drawnAt(1, elbow)[3]).toBe(0);
    await click(picturePoint(300, 300));
    expect(desk.markAt('right', 90)?.shoulder?.x).toBeCloseTo(300, 6);
  });

  it('shows the newest of several requests and closes the pictures of all others', async () => {
    const desk = bareDesk();
    await show(desk);
    source.hold();
    for (const frame of [3, 4, 5]) {
      desk.goTo(frame);
      await fixture.whenStable();
    }
    source.letGo();
    await settle();
    expect(element('.caption').textContent).toContain('Frame 5');
    expect(source.open()).toBe(1);
    fixture.destroy();
    expect(source.open()).toBe(0);
    expect(source.closed).toBe(true);
  });

  it('shows single pixels with hard edges when zoomed in', async () => {
    await show(bareDesk(), new PaintedSource({ x: 600, y: 300, side: 1 }));
    controller.zoomBy(1e4, toStage(controller.view(), picturePoint(600.5, 300.5)));
    await settle();
    expect(controller.view().scale).toBeGreaterThanOrEqual(32);
    expect(pictureAt(picturePoint(600.05, 300.05))).toBeGreaterThan(200);
    expect(pictureAt(picturePoint(600.95, 300.95))).toBeGreaterThan(200);
    expect(pictureAt(picturePoint(599.95, 300.5))).toBeLessThan(100);
    expect(pictureAt(picturePoint(601.05, 300.5))).toBeLessThan(100);
  });

  it('says why a damaged frame is missing and leads on to one that can be shown', async () => {
    const desk = bareDesk();
    await show(desk);
    [20, 21].forEach((frame) => source.damaged.add(frame));
    desk.goTo(20);
    await settle();
    expect(element('.trouble').textContent).toContain('Frame 20 is damaged');
    expect(element('.caption').textContent).toContain('Frame 0');
    element('.ways button:nth-of-type(2)').click();
    await settle();
    expect(desk.frame()).toBe(22);
    expect(element('.caption').textContent).toContain('Frame 22');
    expect((fixture.nativeElement as HTMLElement).querySelector('.trouble')).toBeNull();
  });

  it('refuses a clip whose frames are not the ones that the server knows', async () => {
    const desk = deskState({ frameTimesUs: [0, 16_000, 33_333] });
    await show(desk);
    expect(element('.trouble').textContent).toContain('not those that were found when it was uploaded');
    expect(source.closed).toBe(true);
  });
});

describe('placing joints', () => {
  const wanted = [picturePoint(601.25, 250.5), picturePoint(700.75, 300.125), picturePoint(760.5, 390.375)];

  it.each([
    ['at fit', 1],
    ['at eight times', 8],
  ])('lands on the exact points, %s', async (_, zoom) => {
    const desk = bareDesk();
    await show(desk);
    for (const point of wanted) {
      controller.fit();
      if (zoom > 1) controller.zoomBy(zoom / controller.view().scale, toStage(controller.view(), point));
      await settle();
      await click(point);
    }
    const mark = desk.markAt('right', 0);
    const placed = [mark?.shoulder, mark?.elbow, mark?.wrist];
    placed.forEach((point, i) => {
      expect(Math.abs((point?.x ?? NaN) - (wanted[i]?.x ?? NaN))).toBeLessThan(0.01);
      expect(Math.abs((point?.y ?? NaN) - (wanted[i]?.y ?? NaN))).toBeLessThan(0.01);
    });
    expect(desk.task().kind).toBe('look');
  });

  it('draws each joint on its point, in the colour of its arm', async () => {
    const desk = bareDesk();
    await show(desk);
    for (const point of wanted) await click(point);
    fire('pointermove', picturePoint(100, 600));
    await settle();
    const [red, green, blue, alpha] = drawnAt(1, wanted[2] ?? picturePoint(0, 0));
    expect(alpha).toBeGreaterThan(240);
    expect(blue).toBeGreaterThan(red + 60);
    expect(blue).toBeGreaterThan(green);
    expect(drawnAt(1, picturePoint(100, 600))[3]).toBe(0);
  });

  it('shows the loupe beside the pointer and no longer', async () => {
    await show(bareDesk());
    fire('pointermove', picturePoint(600, 300));
    await settle();
    expect(element('.loupe').classList).toContain('shown');
    fire('pointerleave', picturePoint(600, 300));
    await settle();
    expect(element('.loupe').classList).not.toContain('shown');
  });

  it('magnifies the very pixel that a joint would be placed on', async () => {
    await show(bareDesk(), new PaintedSource({ x: 640, y: 300, side: 1 }));
    fire('pointermove', picturePoint(640.5, 300.5));
    await settle();
    const loupe = element<HTMLCanvasElement>('.loupe');
    const ratio = loupe.width / 148;
    const middle = loupe.width / 2;
    const scale = 4 * ratio;
    const level = (dx: number, dy: number) =>
      loupe.getContext('2d')?.getImageData(middle + dx * scale, middle + dy * scale, 1, 1).data[0] ?? -1;
    // Off the cross in the middle, still inside the light pixel, and just outside it.
    expect(level(0.4, 0.4)).toBeGreaterThan(200);
    expect(level(-0.4, 0.4)).toBeGreaterThan(200);
    expect(level(0.8, 0.8)).toBeLessThan(100);
    expect(level(-0.8, -0.8)).toBeLessThan(100);
  });
});

describe('dragging a joint', () => {
  let desk: DeskState;
  const mark = testMarks.find(({ arm, frame }) => arm === 'right' && frame === 84);
  const elbow = asPicturePoint(mark?.elbow ?? { x: NaN, y: NaN });
  const moved = picturePoint(elbow.x + 60, elbow.y - 40);

  beforeEach(async () => {
    desk = deskState();
    await show(desk);
    desk.goTo(84);
    desk.chooseArm('right');
    await settle();
  });

  it('draws the joint under the pointer in the next display frame, with the readings following', async () => {
    const before = desk.readingAtFrame().right;
    fire('pointerdown', elbow);
    fire('pointermove', moved);
    await new Promise(requestAnimationFrame);
    await new Promise(requestAnimationFrame);
    expect(drawnAt(1, moved)[3]).toBeGreaterThan(240);
    expect(desk.readingAtFrame().right).not.toEqual(before);
    fire('pointerup', moved);
    await settle();
    expect(desk.markAt('right', 84)?.elbow?.x).toBeCloseTo(moved.x, 6);
    expect(desk.undoWords()).toBe('the right elbow on frame 84');
    desk.undo();
    expect(desk.markAt('right', 84)?.elbow).toEqual(mark?.elbow);
    expect(desk.undoWords()).toBeNull();
  });

  it('goes back on Escape', async () => {
    fire('pointerdown', elbow);
    fire('pointermove', moved);
    await settle();
    element('st-stage').dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }));
    await settle();
    fire('pointerup', moved);
    expect(desk.markAt('right', 84)?.elbow).toEqual(mark?.elbow);
    expect(desk.undoWords()).toBeNull();
  });

  it('draws the forearm angle that the readings say', async () => {
    await settle();
    expect(element('.words').textContent).toContain('Right arm: forearm 40°');
    expect(element('.caption').textContent).toContain('right pull, 33 %');
  });

  it('is not for those who may only look', async () => {
    fixture.componentInstance.state.set(deskState({ canEdit: false }));
    fixture.componentInstance.state().goTo(84);
    await settle();
    fire('pointerdown', elbow);
    fire('pointermove', moved);
    fire('pointerup', moved);
    expect(fixture.componentInstance.state().markAt('right', 84)?.elbow).toEqual(mark?.elbow);
  });
});

describe('beside the mark', () => {
  it('draws what someone else saved meanwhile, and says so', async () => {
    const desk = deskState();
    await show(desk);
    desk.goTo(84);
    desk.chooseArm('right');
    await settle();
    const wrist = picturePoint(400, 500);
    expect(drawnAt(1, wrist)[3]).toBe(0);
    const own = desk.markAt('right', 84);
    if (!own?.shoulder || !own.elbow) throw new Error('no mark');
    const { shoulder, elbow } = own;
    fixture.componentInstance.theirs.set([{ arm: 'right', frame: 84, shoulder, elbow, wrist }]);
    await settle();
    expect(drawnAt(1, wrist)[3]).toBeGreaterThan(100);
    expect(element('.words').textContent).toContain('Someone else marked it differently');
  });

  it('draws the same arm on its neighbours faintly while that is wanted', async () => {
    const desk = deskState();
    await show(desk);
    desk.goTo(84);
    desk.chooseArm('right');
    await settle();
    const neighbour = asPicturePoint(desk.markAt('right', 89)?.wrist ?? { x: NaN, y: NaN });
    expect(drawnAt(0, neighbour)[3]).toBe(0);
    controller.toggleTrail();
    await settle();
    const [, , , faint] = drawnAt(0, neighbour);
    expect(faint).toBeGreaterThan(40);
    expect(faint).toBeLessThan(200);
    expect(desk.undoWords()).toBeNull();
  });
});

describe('the plumb', () => {
  it('is drawn by a drag and saved as one step', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.setUp.startPlumb();
    await settle();
    fire('pointerdown', picturePoint(200, 600));
    fire('pointermove', picturePoint(190, 100));
    await settle();
    expect(desk.plumb()?.top.x).toBeCloseTo(200, 6);
    fire('pointerup', picturePoint(190, 100));
    await settle();
    expect(desk.plumb()?.top.y).toBeCloseTo(100, 6);
    expect(desk.plumb()?.bottom.x).toBeCloseTo(200, 6);
    expect(desk.setUp.drawingPlumb()).toBe(false);
    desk.undo();
    expect(desk.plumb()).toBeNull();
  });
});

describe('the plumb by keyboard', () => {
  it('is moved by its ends and saved with Enter', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.setUp.startPlumb();
    await settle();
    const lower = element('st-plumb-ends button:last-of-type');
    const key = (name: string, shiftKey = false) => {
      lower.dispatchEvent(
        new KeyboardEvent('keydown', { key: name, shiftKey, bubbles: true, cancelable: true }),
      );
    };
    key('ArrowRight', true);
    key('ArrowRight');
    key('ArrowUp');
    await settle();
    expect(desk.plumb()).toEqual({ top: { x: 640, y: 144 }, bottom: { x: 651, y: 575 } });
    expect(lower.getAttribute('aria-label')).toContain('leans 1.5°');
    key('Enter');
    await settle();
    expect(desk.undoWords()).toBe('the plumb');
    expect((fixture.nativeElement as HTMLElement).querySelector('st-plumb-ends')).toBeNull();
  });
});

describe('the keyboard', () => {
  it('brings the crosshair up when it moves it, and a pointer puts it away', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.marking.nudgeJoint(10, 0);
    await settle();
    const beside = picturePoint(650, 200);
    expect(drawnAt(1, beside)[3]).toBeGreaterThan(0);
    expect(element('.loupe').classList).toContain('shown');
    fire('pointermove', picturePoint(300, 600));
    await settle();
    expect(drawnAt(1, beside)[3]).toBe(0);
  });
});

describe('playing', () => {
  it('shows every frame in order and stops at the end', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.goTo(290);
    await settle();
    source.asked.length = 0;
    desk.play.start(1);
    for (let turn = 0; turn < 200 && (desk.play.playing() || turn < 3); turn++) {
      await new Promise(requestAnimationFrame);
    }
    await settle();
    expect(desk.play.playing()).toBe(false);
    expect(desk.frame()).toBe(299);
    expect(source.asked).toEqual([291, 292, 293, 294, 295, 296, 297, 298, 299]);
    expect(source.open()).toBe(1);
  });

  it('stops when the person goes elsewhere', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.play.start(1);
    await settle();
    desk.goTo(100);
    await settle();
    expect(desk.play.playing()).toBe(false);
    expect(element('.caption').textContent).toContain('Frame 100');
  });
});
