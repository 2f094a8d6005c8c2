import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import type { ArmSide } from '@stillstroke/geometry/arm';
import { framesStillToMark, framesToMark } from '@stillstroke/geometry/events/stroke';
import { strokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import { defaultJointUncertaintyPx } from '@stillstroke/geometry/uncertainty/joint-uncertainty';
import { FILM_NAMES, type FilmName, type FilmTruth, readFilmTruth } from './film-truth';
import { type DemoMarking, marksFromTruth, trueJoints } from './marks-from-truth';

const FOLDER = fileURLToPath(new URL('../../demo-media/', import.meta.url));
const read = (name: FilmName): FilmTruth => readFilmTruth(FOLDER, name);
const EXACT = { seed: 1, spreadPx: 0, joints: true } as const;
const timesOf = (truth: FilmTruth): number[] =>
  Array.from({ length: truth.frameCount }, (_, frame) => Math.round((frame * 1e6) / truth.framesPerSecond));

/** A measure of every stroke of an arm, as the product computes it. */
function measured(
  truth: FilmTruth,
  marking: DemoMarking,
  arm: ArmSide,
  measure: 'verticalAt' | 'peakDrop',
  breath?: boolean,
): number[] {
  const marks = marking.marks.filter((mark) => mark.arm === arm);
  const context = {
    plumb: marking.plumb,
    travel: truth.travel,
    jointUncertaintyPx: defaultJointUncertaintyPx(truth),
  };
  return marking.strokes
    .filter((stroke) => stroke.arm === arm && (breath === undefined || stroke.breath === breath))
    .map((stroke) => {
      const outcome = strokeMeasures(stroke, marks, timesOf(truth), context)[measure];
      if (!outcome.ok) throw new Error(`${truth.file}, ${arm} ${stroke.entry}: ${outcome.reason}`);
      return outcome.value.value;
    });
}

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length;

describe('marks made from true values', () => {
  it.each(FILM_NAMES)('%s: exact marks read the true angles', (name) => {
    const truth = read(name);
    const { marks, plumb } = marksFromTruth(truth, EXACT);
    expect(marks.length).toBeGreaterThan(20);
    for (const mark of marks) {
      const angles = armAngles(mark, { plumb, travel: truth.travel });
      if (!angles.ok) throw new Error(angles.reason);
      const [forearmDeg = 0, upperArmDeg = 0, elbowDeg = 0, elbowDropDeg = 0] =
        truth.frames[mark.arm][mark.frame]?.slice(6) ?? [];
      expect(Math.abs(angles.value.forearmDeg - forearmDeg)).toBeLessThan(0.1);
      expect(Math.abs(angles.value.upperArmDeg - upperArmDeg)).toBeLessThan(0.1);
      expect(Math.abs(angles.value.elbowDeg - elbowDeg)).toBeLessThan(0.1);
      expect(Math.abs(angles.value.elbowDropDeg - elbowDropDeg)).toBeLessThan(0.1);
    }
  });

  it.each(FILM_NAMES)('%s: leaves no frame that a stroke still needs', (name) => {
    const truth = read(name);
    const { strokes, marks } = marksFromTruth(truth, EXACT);
    expect(strokes.length).toBe(truth.strokes.length);
    for (const stroke of strokes) {
      const needed = framesToMark(stroke, timesOf(truth));
      if (!needed.ok) throw new Error(needed.reason);
      const marked = marks.filter(({ arm }) => arm === stroke.arm).map(({ frame }) => frame);
      const left = framesStillToMark(needed.value, marked).filter(({ need }) => need !== 'mid-pull');
      expect(left).toEqual([]);
    }
  });

  it('spreads the joints as told, without a lean, and the same way for the same seed', () => {
    const truth = read('ines-november');
    const off: Record<'shoulder' | 'elbow' | 'wrist', number[]> = { shoulder: [], elbow: [], wrist: [] };
    for (let seed = 1; seed <= 40; seed += 1) {
      for (const mark of marksFromTruth(truth, { seed, spreadPx: 2, joints: true }).marks) {
        const exact = trueJoints(truth, mark.arm, mark.frame);
        for (const joint of ['shoulder', 'elbow', 'wrist'] as const) {
          off[joint].push(mark[joint].x - exact[joint].x, mark[joint].y - exact[joint].y);
        }
      }
    }
    const spread = (values: readonly number[]): number => Math.sqrt(mean(values.map((value) => value ** 2)));
    expect(Math.abs(mean(off.wrist))).toBeLessThan(0.1);
    expect(spread(off.wrist)).toBeCloseTo(2, 0);
    expect(spread(off.elbow)).toBeCloseTo(2, 0);
    expect(spread(off.shoulder)).toBeCloseTo(3, 0);
    const plan = { seed: 4, spreadPx: 1, joints: true };
    expect(marksFromTruth(truth, plan)).toEqual(marksFromTruth(truth, plan));
    expect(marksFromTruth(truth, { ...plan, seed: 5 })).not.toEqual(marksFromTruth(truth, plan));
  });

  it('takes some strokes of each arm, or the events alone', () => {
    const truth = read('ines-july');
    const all = marksFromTruth(truth, EXACT).strokes.filter(({ arm }) => arm === 'right');
    const some = marksFromTruth(truth, { ...EXACT, strokes: [1, 3] });
    expect(some.strokes.filter(({ arm }) => arm === 'right')).toEqual(all.slice(1, 3));
    const first = some.strokes[0]?.entry ?? 0;
    expect(some.marks.filter(({ arm, frame }) => arm === 'left' && frame < first)).toEqual([]);
    expect(marksFromTruth(truth, { ...EXACT, joints: false }).marks).toEqual([]);
  });

  it('refuses a frame that the film does not have', () => {
    expect(() => trueJoints(read('ines-july'), 'left', 100_000)).toThrow(
      'ines-july.mp4 has no frame 100000.',
    );
  });
});

describe('what the demo’s athletes show when the product measures them', () => {
  it.each(FILM_NAMES.filter((name) => name !== 'mina-front'))(
    '%s: vertical where the model put it, within what whole frames allow',
    (name) => {
      const truth = read(name);
      for (const arm of ['left', 'right'] as const) {
        const exact = measured(truth, marksFromTruth(truth, EXACT), arm, 'verticalAt');
        const told = truth.strokes
          .filter((stroke) => stroke.arm === arm)
          .map((stroke) => stroke.verticalAtShare ?? NaN);
        const frameShare = 1 / truth.framesPerSecond / 0.5;
        exact.forEach((value, at) =>
          expect(Math.abs(value - (told[at] ?? NaN))).toBeLessThan(0.75 * frameShare),
        );
      }
    },
  );

  it('Ines: the right arm late, and dropping when she breathes', () => {
    const truth = read('ines-november');
    const marking = marksFromTruth(truth, { seed: 108, spreadPx: 1, joints: true });
    const gap =
      mean(measured(truth, marking, 'right', 'verticalAt')) -
      mean(measured(truth, marking, 'left', 'verticalAt'));
    expect(gap).toBeGreaterThan(0.18);
    const breathing = measured(truth, marking, 'right', 'peakDrop', true);
    const others = measured(truth, marking, 'right', 'peakDrop', false);
    expect(breathing.length).toBeGreaterThanOrEqual(3);
    expect(others.length).toBeGreaterThanOrEqual(3);
    expect(mean(breathing) - mean(others)).toBeGreaterThan(5);
    expect(mean(measured(truth, marking, 'left', 'peakDrop'))).toBeLessThan(0);
  });

  it('Tomas: no difference between the arms', () => {
    const truth = read('tomas-autumn');
    const marking = marksFromTruth(truth, { seed: 206, spreadPx: 1, joints: true });
    const [left, right] = (['left', 'right'] as const).map((arm) =>
      mean(measured(truth, marking, arm, 'verticalAt')),
    );
    expect(Math.abs((left ?? 0) - (right ?? 1))).toBeLessThan(0.04);
  });

  it('Rhona: earlier and higher from June to November', () => {
    const at = (name: FilmName, seed: number, measure: 'verticalAt' | 'peakDrop'): number => {
      const truth = read(name);
      return mean(
        measured(truth, marksFromTruth(truth, { seed, spreadPx: 1, joints: true }), 'left', measure),
      );
    };
    expect(at('rhona-june', 301, 'verticalAt') - at('rhona-november', 307, 'verticalAt')).toBeGreaterThan(
      0.1,
    );
    expect(at('rhona-june', 301, 'peakDrop') - at('rhona-november', 307, 'peakDrop')).toBeGreaterThan(5);
  });
});
