import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { DeskState } from '../state/desk-state';
import { bareDesk, deskState, testMarks } from '../state/testing';
import { asPicturePoint, picturePoint } from './spaces';
import { click, controller, drawnAt, element, fire, fixture, settle, show, takeDown } from './stage-on-page';
import { PaintedSource } from './testing';
import { toStage } from './view-transform';

afterEach(takeDown);

describe('placing joints', () => {
  const wanted = [picturePoint(601.25, 250.5), picturePoint(700.75, 300.125), picturePoint(760.5, 390.375)];

  it.each([
    ['at fit', 1],
    ['at eight times', 8],
  ])('lands on the exact points, %s', async (_, zoom) => {
    const desk = bareDesk();
    await show(desk);
    for (const point of wanted) {
      controller().fit();
      if (zoom > 1)
        controller().zoomBy(zoom / controller().view().scale, toStage(controller().view(), point));
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
    fixture().componentInstance.state.set(deskState({ canEdit: false }));
    fixture().componentInstance.state().goTo(84);
    await settle();
    fire('pointerdown', elbow);
    fire('pointermove', moved);
    fire('pointerup', moved);
    expect(fixture().componentInstance.state().markAt('right', 84)?.elbow).toEqual(mark?.elbow);
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
    fixture().componentInstance.theirs.set([{ arm: 'right', frame: 84, shoulder, elbow, wrist }]);
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
    controller().toggleTrail();
    await settle();
    const [, , , faint] = drawnAt(0, neighbour);
    expect(faint).toBeGreaterThan(40);
    expect(faint).toBeLessThan(200);
    expect(desk.undoWords()).toBeNull();
  });
});
