import { strokeLength } from '@stillstroke/geometry/events/stroke-length';
import { strokeRate } from '@stillstroke/geometry/events/stroke-rate';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/**
 * Craig AB Jr, Pendergast DR (1979). Relationships of stroke rate, distance per stroke, and velocity in competitive
 * swimming. Med Sci Sports 11(3):278–283 [SEEN pubmed.ncbi.nlm.nih.gov/522640]; speed = rate × length
 * [SEEN PMC3613086]. Stroke index: Costill DL et al. (1985) Int J Sports Med 6(5):266–270, formula [MEM].
 */
describe('rate, length, speed, index', () => {
  it.each([
    // V m/s, cycles/min, SL m, SI m²/s: [CALC]
    [1.5, 42, 2.142857, 3.214286],
    [1.8, 54, 2.0, 3.6],
    [1.98, 54, 2.2, 4.356],
    [1.0, 30, 2.0, 2.0],
  ])('%f m/s at %f cycles a minute [CALC]', (speed, rate, length, index) => {
    const swim = valueOf(
      strokeLength({
        cyclesPerSecond: { value: rate / 60, uncertainty: 0 },
        distanceM: { value: 10 * speed, uncertainty: 0 },
        durationS: { value: 10, uncertainty: 0 },
      }),
    );
    expect(swim.speed.value).toBeCloseTo(speed, 9);
    expect(swim.length.value).toBeCloseTo(length, 6);
    expect(swim.index.value).toBeCloseTo(index, 6);
  });

  it('the worked example with its uncertainties [CALC]', () => {
    const times = Array.from({ length: 400 }, (_, frame) => frame * 20_000);
    const stroke = (entry: number) => ({ entry, catch: entry + 20, exit: entry + 50, nextEntry: entry + 70 });
    const rate = valueOf(strokeRate([stroke(0), stroke(70), stroke(140)], times, { eventErrorFrames: 0.5 }));
    expect(rate.durationS).toBeCloseTo(4.2, 12);
    expect(rate.cyclesPerMinute).toBeCloseTo(42.857143, 6);
    expect(rate.uncertainty).toBeCloseTo(0.083316, 6);
    const swim = valueOf(
      strokeLength({
        cyclesPerSecond: { value: rate.cyclesPerMinute / 60, uncertainty: rate.uncertainty / 60 },
        distanceM: { value: 10, uncertainty: 0.05 },
        durationS: { value: 6.8, uncertainty: (Math.SQRT2 * 0.02) / Math.sqrt(12) },
      }),
    );
    expect(swim.speed.value).toBeCloseTo(1.470588, 6);
    expect(swim.length.value).toBeCloseTo(2.058824, 6);
    expect(swim.index.value).toBeCloseTo(3.027682, 6);
    // First-order slopes by small differences: the last printed digit may be off by one.
    expect(swim.speed.uncertainty).toBeCloseTo(0.007562, 5);
    expect(swim.length.uncertainty).toBeCloseTo(0.011318, 5);
    expect(swim.index.uncertainty).toBeCloseTo(0.031689, 5);
  });

  it('slow motion: the capture rate factor makes rates those of the world', () => {
    const times = Array.from({ length: 400 }, (_, frame) => frame * 20_000);
    const stroke = { entry: 0, catch: 80, exit: 200, nextEntry: 280 };
    const rate = valueOf(strokeRate([stroke], times, { captureRateFactor: 0.25 }));
    expect(rate.cyclesPerMinute).toBeCloseTo(42.857143, 6);
  });
});

/** Ogaratto, Feitosa, Castro (2023) Apunts 154:44–51 [SEEN abstract]: SL 1.5, V 0.98, index 1.67 (means). */
describe('the product of means is not the mean index', () => {
  it('0.98 × 1.5 is not the printed 1.67 [SEEN abstract]', () => {
    expect(0.98 * 1.5).toBeCloseTo(1.47, 9);
    const index = (speed: number, rate: number) =>
      valueOf(
        strokeLength({
          cyclesPerSecond: { value: rate, uncertainty: 0 },
          distanceM: { value: speed, uncertainty: 0 },
          durationS: { value: 1, uncertainty: 0 },
        }),
      );
    const [slow, fast] = [index(0.8, 0.9), index(1.2, 0.5)];
    const meanIndex = (slow.index.value + fast.index.value) / 2;
    const product =
      ((slow.speed.value + fast.speed.value) / 2) * ((slow.length.value + fast.length.value) / 2);
    expect(Math.abs(meanIndex - product)).toBeGreaterThan(0.1);
  });
});
