import { describe, expect, it } from 'vitest';
import { ensemble } from './ensemble';
import { resample } from './resample';

describe('curve over the pull', () => {
  it('is drawn only where marks support it', () => {
    const curve = resample([
      { share: 0.1, deg: 80 },
      { share: 0.3, deg: 60 },
      { share: 0.8, deg: -10 },
      { share: 0.9, deg: -20 },
    ]);
    expect(curve[9]).toBeNull();
    expect(curve[10]).toBe(80);
    expect(curve[20]).toBeCloseTo(70, 9);
    expect(curve[30]).toBe(60);
    expect(curve[31]).toBeNull();
    expect(curve[79]).toBeNull();
    expect(curve[80]).toBe(-10);
    expect(curve[85]).toBeCloseTo(-15, 9);
    expect(curve[91]).toBeNull();
  });

  it('does not mind order, doubles, or values that are none', () => {
    const samples = [
      { share: 0.3, deg: 60 },
      { share: NaN, deg: 1 },
      { share: 0.1, deg: 80 },
      { share: 0.2, deg: Infinity },
      { share: 0.1, deg: 80 },
    ];
    expect(resample(samples)[20]).toBeCloseTo(70, 9);
    expect(resample([]).every((deg) => deg === null)).toBe(true);
    expect(resample([{ share: 0.5, deg: 3 }]).filter((deg) => deg !== null)).toEqual([3]);
  });

  it('averages only the strokes that reach a percent', () => {
    const mean = ensemble([
      resample([
        { share: 0, deg: 10 },
        { share: 0.3, deg: 40 },
      ]),
      resample([
        { share: 0.2, deg: 20 },
        { share: 0.5, deg: 50 },
      ]),
    ]);
    expect(mean[10]).toEqual({ count: 1, mean: 20, sd: null });
    expect(mean[30]?.count).toBe(2);
    expect(mean[30]?.mean).toBeCloseTo(35, 9);
    expect(mean[30]?.sd).toBeCloseTo(Math.sqrt(50), 9);
    expect(mean[60]).toEqual({ count: 0, mean: null, sd: null });
  });
});
