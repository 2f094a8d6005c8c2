import { afterEach, describe, expect, it } from 'vitest';
import { bareDesk, deskState, testMarks } from '../state/testing';
import { asPicturePoint, picturePoint } from './spaces';
import {
  click,
  controller,
  drawnAt,
  element,
  fixture,
  pictureAt,
  settle,
  show,
  source,
  takeDown,
} from './stage-on-page';
import { levelOf, PaintedSource } from './testing';
import { toStage } from './view-transform';

afterEach(takeDown);

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
    source().hold();
    desk.goTo(9);
    await settle();
    await new Promise((resolve) => setTimeout(resolve, 200));
    await settle();
    expect(element('.caption').textContent).toContain('Frame 0 of 300');
    expect(element('.loading').textContent).toContain('Loading frame 9');
    expect(Math.abs(pictureAt(picturePoint(640, 360)) - levelOf(0))).toBeLessThanOrEqual(2);
    source().letGo();
    await settle();
    expect(element('.caption').textContent).toContain('Frame 9 of 300');
    expect((fixture().nativeElement as HTMLElement).querySelector('.loading')).toBeNull();
  });

  it('keeps its own marks with it, and lets nothing be placed on a frame that is not seen', async () => {
    const desk = deskState({ marks: testMarks.filter(({ arm, frame }) => arm === 'right' && frame === 84) });
    const elbow = asPicturePoint(desk.markAt('right', 84)?.elbow ?? { x: NaN, y: NaN });
    await show(desk);
    desk.goTo(84);
    await settle();
    source().hold();
    desk.goTo(90);
    await settle();
    expect(drawnAt(1, elbow)[3]).toBeGreaterThan(240);
    expect(element('.words').textContent).toContain('Right arm: forearm 40°');
    await click(picturePoint(300, 300));
    expect(desk.markAt('right', 90)).toBeNull();
    source().letGo();
    await settle();
    expect(drawnAt(1, elbow)[3]).toBe(0);
    await click(picturePoint(300, 300));
    expect(desk.markAt('right', 90)?.shoulder?.x).toBeCloseTo(300, 6);
  });

  it('shows the newest of several requests and closes the pictures of all others', async () => {
    const desk = bareDesk();
    await show(desk);
    source().hold();
    for (const frame of [3, 4, 5]) {
      desk.goTo(frame);
      await fixture().whenStable();
    }
    source().letGo();
    await settle();
    expect(element('.caption').textContent).toContain('Frame 5');
    expect(source().open()).toBe(1);
    fixture().destroy();
    expect(source().open()).toBe(0);
    expect(source().closed).toBe(true);
  });

  it('shows single pixels with hard edges when zoomed in', async () => {
    await show(bareDesk(), new PaintedSource({ x: 600, y: 300, side: 1 }));
    controller().zoomBy(1e4, toStage(controller().view(), picturePoint(600.5, 300.5)));
    await settle();
    expect(controller().view().scale).toBeGreaterThanOrEqual(32);
    expect(pictureAt(picturePoint(600.05, 300.05))).toBeGreaterThan(200);
    expect(pictureAt(picturePoint(600.95, 300.95))).toBeGreaterThan(200);
    expect(pictureAt(picturePoint(599.95, 300.5))).toBeLessThan(100);
    expect(pictureAt(picturePoint(601.05, 300.5))).toBeLessThan(100);
  });

  it('says why a damaged frame is missing and leads on to one that can be shown', async () => {
    const desk = bareDesk();
    await show(desk);
    [20, 21].forEach((frame) => source().damaged.add(frame));
    desk.goTo(20);
    await settle();
    expect(element('.trouble').textContent).toContain('Frame 20 is damaged');
    expect(element('.caption').textContent).toContain('Frame 0');
    element('.ways button:nth-of-type(2)').click();
    await settle();
    expect(desk.frame()).toBe(22);
    expect(element('.caption').textContent).toContain('Frame 22');
    expect((fixture().nativeElement as HTMLElement).querySelector('.trouble')).toBeNull();
  });

  it('refuses a clip whose frames are not the ones that the server knows', async () => {
    const desk = deskState({ frameTimesUs: [0, 16_000, 33_333] });
    await show(desk);
    expect(element('.trouble').textContent).toContain('not those that were found when it was uploaded');
    expect(source().closed).toBe(true);
  });
});

describe('playing', () => {
  it('shows every frame in order and stops at the end', async () => {
    const desk = bareDesk();
    await show(desk);
    desk.goTo(290);
    await settle();
    source().asked.length = 0;
    desk.play.start(1);
    for (let turn = 0; turn < 200 && (desk.play.playing() || turn < 3); turn++) {
      await new Promise(requestAnimationFrame);
    }
    await settle();
    expect(desk.play.playing()).toBe(false);
    expect(desk.frame()).toBe(299);
    expect(source().asked).toEqual([291, 292, 293, 294, 295, 296, 297, 298, 299]);
    expect(source().open()).toBe(1);
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
