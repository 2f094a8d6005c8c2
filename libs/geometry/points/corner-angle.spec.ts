import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { reasonOf, valueOf } from '../testing/arms';
import { angleAtCorner } from './corner-angle';

const at = (x: number, y: number) => ({ x, y });
const turned = (deg: number, length = 1) =>
  at(length * Math.cos((deg * Math.PI) / 180), length * Math.sin((deg * Math.PI) / 180));

describe('the angle at a corner', () => {
  it('is that between its legs, in any quadrant and either way round', () => {
    for (const first of [0, 37, 90, 135, 181, 270, 359])
      for (const between of [0, 0.001, 30, 90, 135, 179.999, 180])
        for (const way of [1, -1]) {
          const angle = valueOf(angleAtCorner(at(0, 0), turned(first), turned(first + way * between, 7)));
          expect(angle).toBeCloseTo(between, 9);
        }
  });

  it('does not change when everything is moved or scaled', () => {
    const number = fc.integer({ min: -1000, max: 1000 });
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 180 }),
        number,
        number,
        fc.integer({ min: 1, max: 50 }),
        (deg, x, y, by) => {
          const moved = angleAtCorner(
            at(x, y),
            at(x + by, y),
            at(x + turned(deg, by).x, y + turned(deg, by).y),
          );
          expect(valueOf(moved)).toBeCloseTo(deg, 6);
        },
      ),
    );
  });

  it('is none where a leg has no direction', () => {
    expect(reasonOf(angleAtCorner(at(1, 1), at(1, 1), at(2, 2)))).toBe('no-direction');
    expect(reasonOf(angleAtCorner(at(1, 1), at(2, 2), at(NaN, 2)))).toBe('no-direction');
  });
});
