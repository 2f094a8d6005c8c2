import { indexOfCoordination } from '@stillstroke/geometry/events/coordination';
import { eventTimeUncertaintyUs } from '@stillstroke/geometry/events/frame-times';
import { strokePhases } from '@stillstroke/geometry/events/phases';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/** Uncertainty of event timing for a cycle of 1.40 s: [CALC, Monte-Carlo confirmed], no printed source. */
describe.each([
  // fps, u of rounding in ms, u of a phase in percent, u of the index: rounding, ± 1 frame
  [25, 11.547, 1.16642, 0.82479, 1.64957],
  [30, 9.6225, 0.97202, 0.68732, 1.37464],
  [50, 5.7735, 0.58321, 0.41239, 0.82479],
  [60, 4.8113, 0.48601, 0.34366, 0.68732],
  [120, 2.4056, 0.243, 0.17183, 0.34366],
  [240, 1.2028, 0.1215, 0.08592, 0.17183],
])('%d frames a second', (fps, roundingMs, phasePercent, indexRounded, indexOneFrame) => {
  const cycle = 1.4 * fps;
  const times = Array.from({ length: 3 * cycle }, (_, frame) => (frame * 1e6) / fps);
  const from = (entry: number) => ({
    entry,
    catch: entry + Math.round(0.3 * cycle),
    exit: entry + Math.round(0.7 * cycle),
    nextEntry: entry + cycle,
  });
  const arms = { right: [from(0), from(cycle)], left: [from(Math.round(cycle / 2))] };

  it('event', () => {
    expect(eventTimeUncertaintyUs(times, 5, 0.5) / 1000).toBeCloseTo(roundingMs, 4);
  });

  it('phase, over a cycle taken as exact', () => {
    const phases = valueOf(strokePhases(from(0), null, times, { eventErrorFrames: 0.5, cycleExact: true }));
    for (const phase of [phases.entryAndCatch, phases.propulsive, phases.recovery]) {
      expect(100 * phase.uncertainty).toBeCloseTo(phasePercent, 5);
    }
  });

  it('index of coordination', () => {
    expect(valueOf(indexOfCoordination(arms, times, { eventErrorFrames: 0.5 })).uncertainty).toBeCloseTo(
      indexRounded,
      5,
    );
    expect(valueOf(indexOfCoordination(arms, times, { eventErrorFrames: 1 })).uncertainty).toBeCloseTo(
      indexOneFrame,
      5,
    );
  });
});
