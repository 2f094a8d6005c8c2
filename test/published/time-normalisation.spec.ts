import { ensemble } from '@stillstroke/geometry/curves/ensemble';
import { resample } from '@stillstroke/geometry/curves/resample';
import { expect, it } from 'vitest';

/** Linear time normalisation to 101 points, pointwise mean and SD (n − 1): usual practice of the field; figures [CALC]. */
it('seven equally spaced samples [CALC]', () => {
  const degrees = [180, 150, 100, 90, 120, 170, 180];
  const curve = resample(degrees.map((deg, i) => ({ share: i / 6, deg })));
  const at = { 0: 180, 1: 178.2, 25: 125, 33: 101, 50: 90, 75: 145, 99: 179.4, 100: 180 };
  for (const [percent, deg] of Object.entries(at)) expect(curve[Number(percent)]).toBeCloseTo(deg, 9);
  expect(Math.min(...curve.map((deg) => deg ?? NaN))).toBe(90);
});

it('the error of straight lines between 41 samples of a cosine stays below h²f″/8 = 0.12337006 [CALC]', () => {
  const truth = (share: number) => 100 + 40 * Math.cos(2 * Math.PI * share);
  const samples = Array.from({ length: 41 }, (_, k) => ({ share: k / 40, deg: truth(k / 40) }));
  const errors = resample(samples).map((deg, percent) => Math.abs((deg ?? NaN) - truth(percent / 100)));
  expect(Math.max(...errors)).toBeLessThan(0.12337006);
  // The oracle, 0.11805569, is the largest error on the 101 points.
  expect(Math.max(...errors)).toBeCloseTo(0.11805569, 7);
});

it('mean of three waveforms [CALC]', () => {
  const waves = [
    [10, 20, 30, 20, 10],
    [12, 21, 33, 19, 9],
    [9, 22, 29, 22, 12],
  ];
  const mean = ensemble(waves.map((wave) => resample(wave.map((deg, i) => ({ share: i / 4, deg })))));
  for (const [at, deg] of [10.333333, 21, 30.666667, 20.333333, 10.333333].entries()) {
    expect(mean[25 * at]?.mean).toBeCloseTo(deg, 6);
    expect(mean[25 * at]?.count).toBe(3);
  }
  expect(mean[50]?.sd).toBeCloseTo(Math.sqrt((0.666667 ** 2 + 2.333333 ** 2 + 1.666667 ** 2) / 2), 5);
});
