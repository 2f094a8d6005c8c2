import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Box, clearance, LABEL_GAP, placeLabel, type Segment } from './label-place';
import { type StagePoint, stagePoint } from './spaces';

const stage = { width: 960, height: 540 };
const size = { width: 60, height: 30 };
const point = fc
  .record({
    x: fc.double({ min: 0, max: 960, noNaN: true }),
    y: fc.double({ min: 0, max: 540, noNaN: true }),
  })
  .map(({ x, y }) => stagePoint(x, y));

/** Whether a segment enters a box, found by walking along it: a check that shares nothing with the code. */
function walksInto(box: Box, [a, b]: Segment): boolean {
  for (let i = 0; i <= 2000; i++) {
    const x = a.x + ((b.x - a.x) * i) / 2000;
    const y = a.y + ((b.y - a.y) * i) / 2000;
    if (x > box.left && x < box.left + box.width && y > box.top && y < box.top + box.height) return true;
  }
  return false;
}

describe('placeLabel', () => {
  it('never covers the arm nor its plumb line, wherever they are', () => {
    fc.assert(
      fc.property(
        point,
        point,
        point,
        fc.double({ min: -4, max: 4, noNaN: true }),
        (shoulder, elbow, wrist, towards) => {
          const lines: Segment[] = [
            [shoulder, elbow],
            [elbow, wrist],
            [elbow, stagePoint(elbow.x, elbow.y + 150)],
          ];
          const box = placeLabel({ round: elbow, towards, from: 60, size }, { lines, boxes: [], stage });
          for (const line of lines) expect(walksInto(box, line)).toBe(false);
          expect(box.left).toBeGreaterThanOrEqual(0);
          expect(box.top).toBeGreaterThanOrEqual(0);
          expect(box.left + box.width).toBeLessThanOrEqual(960);
          expect(box.top + box.height).toBeLessThanOrEqual(540);
        },
      ),
      { numRuns: 400 },
    );
  });

  it('takes the wished place when that is free', () => {
    const box = placeLabel(
      { round: stagePoint(400, 200), towards: Math.PI / 2, from: 80, size },
      { lines: [[stagePoint(400, 200), stagePoint(700, 200)]], boxes: [], stage },
    );
    expect(box.left).toBeCloseTo(370, 9);
    expect(box.top).toBeCloseTo(265, 9);
  });

  it('stays off other labels', () => {
    const wish = { round: stagePoint(400, 200), towards: 0, from: 80, size };
    const first = placeLabel(wish, { lines: [], boxes: [], stage });
    const second = placeLabel(wish, { lines: [], boxes: [first], stage });
    const apartX = Math.max(second.left - first.left - 60, first.left - second.left - 60);
    const apartY = Math.max(second.top - first.top - 30, first.top - second.top - 30);
    expect(Math.max(apartX, apartY)).toBeGreaterThanOrEqual(0);
  });

  it('answers a place even where there is none to be had', () => {
    const tiny = { width: 20, height: 20 };
    const line: Segment = [stagePoint(0, 0), stagePoint(20, 20)];
    const box = placeLabel(
      { round: stagePoint(10, 10), towards: 0, from: 0, size },
      { lines: [line], boxes: [], stage: tiny },
    );
    expect(Number.isFinite(box.left + box.top)).toBe(true);
  });

  it('measures the room round a box', () => {
    const box: Box = { left: 100, top: 100, width: 40, height: 20 };
    const vertical = (x: number): Segment => [stagePoint(x, 0), stagePoint(x, 400)];
    const room = (line: readonly [StagePoint, StagePoint]) =>
      clearance(box, { lines: [line], boxes: [], stage });
    expect(room(vertical(150))).toBe(10);
    expect(room(vertical(120))).toBe(0);
    expect(room([stagePoint(143, 124), stagePoint(300, 300)])).toBe(LABEL_GAP);
  });
});
