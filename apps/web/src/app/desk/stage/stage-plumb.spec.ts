import { afterEach, describe, expect, it } from 'vitest';
import { bareDesk } from '../state/testing';
import { picturePoint } from './spaces';
import { drawnAt, element, fire, fixture, settle, show, takeDown } from './stage-on-page';

afterEach(takeDown);

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
    expect((fixture().nativeElement as HTMLElement).querySelector('st-plumb-ends')).toBeNull();
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
