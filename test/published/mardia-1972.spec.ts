import { circularSummary } from '@stillstroke/geometry/statistics/circular';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { expect, it } from 'vitest';

/** Mardia KV (1972) and Mardia KV, Jupp PE (2000), Directional Statistics [MEM]; printed 51°, .711 and 146°, .725 [MEM]; exact [CALC]. */
const mallards = [40, 22, 20, 9, 6, 3, 3, 1, 6, 3, 11, 22, 24, 58, 136, 138, 143, 69];

it.each([
  [
    'example 1.1',
    [43, 45, 52, 61, 75, 88, 88, 279, 357],
    undefined,
    51.05017711,
    0.710991,
    47.32336639,
    43.56054601,
  ],
  [
    'frogs',
    [104, 110, 117, 121, 127, 130, 136, 144, 152, 178, 184, 192, 200, 316],
    undefined,
    145.8759376,
    0.7251649,
    45.93365,
    42.47895,
  ],
  ['mallards', mallards.map((_, i) => 10 + 20 * i), mallards, 314.27038416, 0.71594844, 46.83888, 43.18533],
  ['350, 10', [350, 10], undefined, 0, 0.98480775, 10.02556025, 9.98731244],
  ['170, −170', [170, -170], undefined, 180, 0.98480775, 10.02556025, 9.98731244],
  ['0, 90', [0, 90], undefined, 45, 0.70710678, 47.70186543, 43.85229112],
  ['88, 90, 92', [88, 90, 92], undefined, 90, 0.99959388, 1.63307608, 1.63291026],
] as const)('%s [CALC]', (_, values, weights, mean, concentration, sd, deviation) => {
  const read = valueOf(circularSummary(values, 360, weights));
  const apart = Math.abs(read.mean - mean);
  expect(Math.min(apart, 360 - apart)).toBeLessThan(1e-7);
  expect(read.concentration).toBeCloseTo(concentration, 7);
  expect(read.sd).toBeCloseTo(sd, 5);
  expect(read.deviation).toBeCloseTo(deviation, 5);
});

it('opposite directions have no mean [CALC]', () => {
  expect(reasonOf(circularSummary([0, 180]))).toBe('no-direction');
  expect(reasonOf(circularSummary([]))).toBe('empty');
  expect(reasonOf(circularSummary([1, NaN]))).toBe('not-finite');
  expect(reasonOf(circularSummary([1], 0))).toBe('bad-period');
});

it('places in a cycle near its wrap: percent with period 100 [CALC]', () => {
  const read = valueOf(circularSummary([98, 2, 1, 99, 0], 100));
  expect(Math.min(read.mean, 100 - read.mean)).toBeLessThan(1e-9);
  expect(read.concentration).toBeCloseTo(0.99605657, 8);
  expect(read.sd).toBeCloseTo(1.41481922, 7);
});
