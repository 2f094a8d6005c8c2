import { describe, expect, it } from 'vitest';
import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { CAST } from '../cast';
import { trueFilm } from '../true-film';
import { KNUCKLES_M, HAND_M, type ArmPose } from './arm-motion';
import { levelPoint, project, rolled } from './camera';
import { earlyPull, latePull, sameAlways, swimmerStyle } from './pulls';
import { swimmerMotion } from './swimmer-motion';
import type { FilmTruth } from './truth';

/** Largest distance of a row's angles from those of its own joints, worked out with dot and cross products alone. */
function worstByHand(truth: FilmTruth): number {
  const down = unit(truth.plumb.bottom.x - truth.plumb.top.x, truth.plumb.bottom.y - truth.plumb.top.y);
  const ahead = truth.travel === 'right' ? { x: down.y, y: -down.x } : { x: -down.y, y: down.x };
  let worst = 0;
  for (const row of [...truth.frames.left, ...truth.frames.right]) {
    const [sx = 0, sy = 0, ex = 0, ey = 0, wx = 0, wy = 0, forearm = 0, upperArm = 0, elbow = 0, drop = 0] =
      row;
    const upper = unit(ex - sx, ey - sy);
    const lower = unit(wx - ex, wy - ey);
    const hand = unit(wx - sx, wy - sy);
    const fromDown = (v: Vector): number =>
      Math.sign(dot(v, ahead)) * degrees(Math.acos(clamp(dot(v, down))));
    const straightness = degrees(Math.acos(clamp(-dot(upper, lower))));
    const side = Math.sign(dot(hand, ahead) * dot(upper, down) - dot(hand, down) * dot(upper, ahead));
    const between = side * degrees(Math.acos(clamp(dot(hand, upper))));
    for (const [told, seen] of [
      [forearm, fromDown(lower)],
      [upperArm, fromDown(upper)],
      [elbow, straightness],
      [drop, between],
    ] as const) {
      worst = Math.max(worst, Math.abs(apart(told, seen)));
    }
  }
  return worst;
}

interface Vector {
  readonly x: number;
  readonly y: number;
}
const unit = (x: number, y: number): Vector => ({ x: x / Math.hypot(x, y), y: y / Math.hypot(x, y) });
const dot = (a: Vector, b: Vector): number => a.x * b.x + a.y * b.y;
const clamp = (value: number): number => Math.max(-1, Math.min(1, value));
const degrees = (radians: number): number => (radians * 180) / Math.PI;
const apart = (a: number, b: number): number => ((((a - b + 180) % 360) + 360) % 360) - 180;

describe('the true values of the films', () => {
  it.each(CAST.map((film) => [film.name, film] as const))(
    '%s: angles are those of the joints drawn',
    (_, film) => {
      expect(worstByHand(trueFilm(film))).toBeLessThan(0.1);
    },
  );

  it.each(CAST.map((film) => [film.name, film] as const))(
    '%s: the product reads the same angles',
    (_, film) => {
      const truth = trueFilm(film);
      let worst = 0;
      for (const row of [...truth.frames.left, ...truth.frames.right]) {
        const [
          sx = 0,
          sy = 0,
          ex = 0,
          ey = 0,
          wx = 0,
          wy = 0,
          forearm = 0,
          upperArm = 0,
          elbow = 0,
          drop = 0,
        ] = row;
        const mark = { shoulder: { x: sx, y: sy }, elbow: { x: ex, y: ey }, wrist: { x: wx, y: wy } };
        const read = armAngles(mark, { travel: truth.travel, plumb: truth.plumb });
        if (!read.ok) throw new Error(read.reason);
        worst = Math.max(
          worst,
          Math.abs(apart(read.value.forearmDeg, forearm)),
          Math.abs(apart(read.value.upperArmDeg, upperArm)),
          Math.abs(apart(read.value.elbowDeg, elbow)),
          Math.abs(apart(read.value.elbowDropDeg, drop)),
        );
      }
      expect(worst).toBeLessThan(0.1);
    },
  );

  it('are the same each time and others for another seed', () => {
    const [film] = CAST;
    if (!film) throw new Error('no film');
    expect(trueFilm(film)).toEqual(trueFilm(film));
    const other = trueFilm({ ...film, style: { ...film.style, seed: film.style.seed + 1 } });
    expect(other.strokes).not.toEqual(trueFilm(film).strokes);
  });

  it.each(CAST.map((film) => [film.name, film] as const))(
    '%s: both arms do enough whole strokes',
    (_, film) => {
      const { strokes } = trueFilm(film);
      for (const arm of ['left', 'right']) {
        expect(strokes.filter((stroke) => stroke.arm === arm).length).toBeGreaterThanOrEqual(3);
      }
    },
  );
});

describe('a stroke', () => {
  const style = swimmerStyle({
    seed: 9,
    arms: {
      left: sameAlways(earlyPull(0.34)),
      right: { plain: latePull(0.55, 3), breathing: latePull(0.61, 11) },
    },
  });
  const motion = swimmerMotion(style, 9);
  const strokes = (['left', 'right'] as const).flatMap((arm) => motion.plan.strokes[arm].slice(1, -1));
  const knuckles = (pose: ArmPose): number =>
    pose.wrist.d + (KNUCKLES_M / HAND_M) * (pose.fingertips.d - pose.wrist.d);

  it('has the hand under water from entry to exit and out of it through the recovery', () => {
    for (const { arm, entryS, exitS, nextEntryS } of strokes) {
      const at = (from: number, to: number, share: number): number =>
        knuckles(motion.poseAt(from + share * (to - from)).arms[arm]);
      for (let share = 0.02; share < 0.99; share += 0.02) {
        expect(at(entryS, exitS, share)).toBeGreaterThan(0);
        expect(at(exitS, nextEntryS, share)).toBeLessThan(0);
      }
      expect(at(entryS, exitS, 0)).toBeCloseTo(0, 6);
      expect(at(entryS, exitS, 1)).toBeCloseTo(0, 6);
    }
  });

  it('has the wrist at its foremost at the catch', () => {
    for (const { arm, entryS, catchS, exitS } of strokes) {
      const wrist = (timeS: number): number => motion.poseAt(timeS).arms[arm].wrist.f;
      for (let step = 1; step <= 20; step += 1) {
        expect(wrist(catchS - step * 0.01)).toBeLessThan(wrist(catchS - (step - 1) * 0.01));
      }
      const rest = Array.from({ length: 50 }, (_, step) =>
        wrist(catchS + ((step + 1) / 50) * (exitS - catchS)),
      );
      expect(Math.max(...rest)).toBeLessThan(wrist(catchS));
      expect(entryS).toBeLessThan(catchS);
    }
  });

  it('comes within 15° of vertical just at the share it was given, and not before', () => {
    for (const { arm, catchS, exitS, shape } of strokes) {
      const forearm = (share: number): number =>
        motion.poseAt(catchS + share * (exitS - catchS)).arms[arm].forearmDeg;
      expect(forearm(shape.verticalAt)).toBeCloseTo(15, 4);
      for (let share = 0; share < shape.verticalAt - 0.001; share += 0.02)
        expect(forearm(share)).toBeGreaterThan(15);
    }
  });

  it('keeps the length of upper arm and forearm as seen from the side', () => {
    for (let timeS = 0; timeS < 9; timeS += 0.07) {
      for (const { shoulder, elbow, wrist } of Object.values(motion.poseAt(timeS).arms)) {
        expect(Math.hypot(elbow.f - shoulder.f, elbow.d - shoulder.d)).toBeCloseTo(0.29, 9);
        expect(Math.hypot(wrist.f - elbow.f, wrist.d - elbow.d)).toBeCloseTo(0.26, 9);
      }
    }
  });

  it('moves without a jump', () => {
    for (const arm of ['left', 'right'] as const) {
      for (let timeS = 0.01; timeS < 9; timeS += 0.004) {
        const before = motion.poseAt(timeS - 0.004).arms[arm];
        const { shoulder, elbow, wrist } = motion.poseAt(timeS).arms[arm];
        expect(Math.hypot(wrist.f - before.wrist.f, wrist.d - before.wrist.d)).toBeLessThan(0.035);
        expect(Math.hypot(elbow.f - before.elbow.f, elbow.d - before.elbow.d)).toBeLessThan(0.025);
        expect(Math.hypot(shoulder.f - before.shoulder.f, shoulder.d - before.shoulder.d)).toBeLessThan(
          0.006,
        );
      }
    }
  });

  it('is breathed on by one stroke in two of each arm', () => {
    for (const arm of ['left', 'right'] as const) {
      const breaths = motion.plan.strokes[arm].slice(2, 8).map(({ breath }) => breath);
      expect(breaths.filter(Boolean)).toHaveLength(3);
    }
  });
});

describe('the camera', () => {
  it('leans a plumb to the right for a positive roll', () => {
    const [film] = CAST;
    if (!film) throw new Error('no film');
    const camera = { ...film.camera, rollDeg: 10 };
    const top = rolled(camera, { x: 0, y: -100 });
    const bottom = rolled(camera, { x: 0, y: 100 });
    expect((Math.atan2(bottom.x - top.x, bottom.y - top.y) * 180) / Math.PI).toBeCloseTo(10, 9);
  });

  it('shows the swimmer’s left to the right of a front view', () => {
    const film = CAST.find(({ camera }) => camera.view === 'front-underwater');
    if (!film) throw new Error('no front view');
    expect(levelPoint(film.camera, { f: 0, d: 0, r: -0.2 }).x).toBeGreaterThan(0);
    const side = { ...film.camera, view: 'side-underwater' as const, travel: 'left' as const, rollDeg: 0 };
    expect(project(side, { f: 0.5, d: 0, r: 0 }).x).toBeLessThan(project(side, { f: 0, d: 0, r: 0 }).x);
  });
});
