import { describe, expect, it } from 'vitest';
import type { FrameMark } from '../arm';
import { elbowInSpace } from '../calibration/projection';
import { strokeMeasures } from '../measures/stroke-measures';
import { constantRate, onFrame, valueOf } from '../testing/arms';
import { cameraTilt } from './camera-tilt';
import { farArm, nearArm, nearFarLengthShare } from './near-arm';
import { edgeRadius, portBending, portCaution } from './port-bending';
import { biasOfTilt, foreshortened } from './segment-tilt';
import { clipCautions, frameCautions, sizeFor, strokeCautions } from './view-cautions';
import type { ViewContext } from './view-context';

const JOINTS = { shoulder: 2, elbow: 2, wrist: 2 };
const context: ViewContext = {
  view: 'side-underwater',
  travel: 'right',
  plumb: { top: { x: 640, y: 60 }, bottom: { x: 640, y: 660 } },
  jointUncertaintyPx: JOINTS,
  picture: { width: 1200, height: 720 },
  fieldOfView: null,
};
const size = (
  caution: { affects: readonly { reading: string; sizeDeg: number }[] } | null,
  reading: string,
) => caution?.affects.find((affected) => affected.reading === reading)?.sizeDeg;

describe('foreshortened segments', () => {
  const full = [10, 20, 30].map((frame) =>
    onFrame(frame, { upperArmDeg: 30 + frame, forearmDeg: frame, upperPx: 200, forePx: 200 }),
  );
  const short = onFrame(40, { upperArmDeg: 60, forearmDeg: 0, upperPx: 200, forePx: 120 });

  it('say how far out of the picture at least, and what it may do to each angle', () => {
    const [caution, ...rest] = foreshortened('left', [...full, short], [short], JOINTS);
    expect(rest).toEqual([]);
    // (120 + 2·√2·√8)/200 = 0.64
    const tilt = (Math.acos(0.64) * 180) / Math.PI;
    expect(caution).toMatchObject({ code: 'foreshortened', arm: 'left', frames: [40], assumed: false });
    expect(caution?.causeDeg).toBeCloseTo(tilt, 9);
    expect(size(caution ?? null, 'forearm')).toBeCloseTo((Math.asin(0.36 / 1.64) * 180) / Math.PI, 9);
    // Projected elbow 120°, upper arm in the plane: cos α = cos e₂ cos 120°, the same whichever way it points.
    expect(size(caution ?? null, 'elbow')).toBeCloseTo(120 - (Math.acos(-0.5 * 0.64) * 180) / Math.PI, 9);
    expect(size(caution ?? null, 'upperArm')).toBeUndefined();
  });

  it('are silent for an arm that keeps its length, and for other frames', () => {
    expect(foreshortened('left', full, full, JOINTS)).toEqual([]);
    expect(foreshortened('left', [...full, short], full, JOINTS)).toEqual([]);
    expect(foreshortened('left', [], [], JOINTS)).toEqual([]);
  });

  it.each([
    // Projected angle and elevations, with the angle in space from the published table.
    [120, 20, 20, 108.93730447],
    [100, 15, 30, 105.94229294],
    [150, 10, 35, 142.96136353],
  ])(
    'elbow %d°, tilts %d° and %d°: at least as far off as one of its signs',
    (projected, e1, e2, inSpace) => {
      const mark = onFrame(0, { upperArmDeg: 0, forearmDeg: 180 - projected });
      const { elbowDeg } = biasOfTilt(mark, { upperArmDeg: e1, forearmDeg: e2 });
      expect(elbowDeg).toBeGreaterThanOrEqual(Math.abs(projected - inSpace) - 1e-6);
      const signs = [elbowInSpace(projected, e1, e2), elbowInSpace(projected, e1, -e2)];
      expect(elbowDeg).toBeGreaterThanOrEqual(
        Math.max(...signs.map((deg) => Math.abs(deg - projected))) - 1e-9,
      );
    },
  );
});

describe('near and far arm', () => {
  it('is told by view and travel', () => {
    expect(nearArm('side-underwater', 'right')).toBe('right');
    expect(nearArm('side-above', 'left')).toBe('left');
    expect(nearArm('front-underwater', 'left')).toBeNull();
    expect(nearArm('deck', 'left')).toBeNull();
  });

  it('a quarter of a metre on either side at 5 m: 10.5 % in length', () => {
    expect(nearFarLengthShare()).toBeCloseTo(5.25 / 4.75 - 1, 12);
    // 1.06383/0.9434 of the published table for 0.3 m.
    expect(nearFarLengthShare(5, 0.3)).toBeCloseTo(1.06383 / 0.9434 - 1, 4);
  });

  it('only the far arm is less sure, by √3 of its own marking at 95 %', () => {
    const mark = onFrame(5, { upperArmDeg: 40, forearmDeg: 20, upperPx: 100, forePx: 80 });
    expect(farArm(context, 'right', mark)).toBeNull();
    const caution = farArm(context, 'left', mark);
    // u = √2·2 px over 80 px, twice that when hidden: √(4u² − u²) = √3·u; roll is the same in both and drops out.
    const u = ((Math.SQRT2 * 2) / 80) * (180 / Math.PI);
    expect(size(caution, 'forearm')).toBeCloseTo(1.96 * Math.sqrt(3) * u, 6);
    expect(caution).toMatchObject({ code: 'far-arm', assumed: true, causeDeg: null });
    const front = { ...context, view: 'front-underwater' as const };
    expect(farArm(front, 'left', mark)).toBeNull();
  });
});

describe('tilt of the camera', () => {
  it('without a plumb: 1.96·2° on what stands against the vertical, nothing on angles between segments', () => {
    const [caution] = clipCautions({ ...context, plumb: null });
    expect(caution).toMatchObject({ code: 'plumb-assumed', arm: null, assumed: true, causeDeg: null });
    expect(caution?.sizeDeg).toBeCloseTo(3.92, 9);
    expect(caution?.affects.map(({ reading }) => reading)).toEqual(['forearm', 'upperArm']);
  });

  it('a short plumb says its own size; a long one nothing', () => {
    expect(cameraTilt(context)).toBeNull();
    const short = { top: { x: 640, y: 60 }, bottom: { x: 640, y: 160 } };
    const caution = cameraTilt({ ...context, plumb: short });
    expect(caution?.code).toBe('plumb-short');
    // √2·2/100 rad = 1.6206°
    expect(caution?.sizeDeg).toBeCloseTo(1.96 * 1.6205694, 5);
  });

  it('a crooked picture is named with its lean, and with what the plumb leaves of it', () => {
    const leaning = { top: { x: 640, y: 100 }, bottom: { x: 740, y: 700 } };
    const caution = cameraTilt({ ...context, plumb: leaning });
    expect(caution?.code).toBe('camera-leans');
    expect(caution?.causeDeg).toBeCloseTo((Math.atan(1 / 6) * 180) / Math.PI, 9);
    expect(caution?.sizeDeg).toBeLessThan(1);
  });

  it('a plumb that cannot be read gives no caution: it has its own refusal', () => {
    expect(cameraTilt({ ...context, plumb: { top: { x: 1, y: 1 }, bottom: { x: 2, y: 2 } } })).toBeNull();
  });
});

describe('flat port', () => {
  it.each([
    // Field of view in air and the same in water (published: air half-angle to water half-angle).
    [60, 22.03],
    [90, 32.037],
    [120, 40.518],
  ])('%d° across in air is ± %f° in water', (air, water) => {
    const inAir = valueOf(edgeRadius({ deg: air, medium: 'air' }));
    const inWater = valueOf(edgeRadius({ deg: 2 * water, medium: 'water' }));
    expect(inWater / inAir).toBeCloseTo(1, 3);
  });

  it('turns directions by the published size at 10°, 15° and 20° off the axis', () => {
    const half = valueOf(edgeRadius({ deg: 60, medium: 'water' }));
    for (const [deg, radius, error] of [
      [10, 1.3494 * 0.17633, 0.7],
      [15, 1.37181 * 0.26795, 1.644],
      [20, 1.40739 * 0.36397, 3.11],
    ] as const) {
      const at = { x: 600 + (600 * radius) / half, y: 360 };
      const bent = valueOf(portBending(at, context.picture, { deg: 60, medium: 'water' }));
      expect(bent.offAxisDeg).toBeCloseTo(deg, 2);
      expect(bent.directionErrorDeg).toBeCloseTo(error, 2);
    }
  });

  it('speaks of arms away from the middle only, and only under water', () => {
    const middle = onFrame(3, { upperArmDeg: 30, forearmDeg: 10, shoulder: { x: 580, y: 300 } });
    const edge = onFrame(3, { upperArmDeg: 30, forearmDeg: 10, shoulder: { x: 1050, y: 500 } });
    expect(portCaution(context, 'right', middle)).toBeNull();
    const caution = portCaution(context, 'right', edge);
    expect(caution).toMatchObject({ code: 'flat-port', assumed: true });
    expect(size(caution, 'elbow')).toBeGreaterThan(size(caution, 'forearm') ?? Infinity);
    const known = { ...context, fieldOfView: { deg: 40, medium: 'water' } as const };
    expect(portCaution(known, 'right', edge)?.assumed).toBe(false);
    expect(portCaution({ ...context, view: 'side-above' }, 'right', edge)).toBeNull();
  });

  it('refuses a field of view that is none', () => {
    for (const deg of [0, -5, NaN, Infinity, 97]) expect(edgeRadius({ deg, medium: 'water' }).ok).toBe(false);
    expect(edgeRadius({ deg: 171, medium: 'air' }).ok).toBe(false);
  });
});

describe('cautions of a stroke', () => {
  const times = constantRate(120, 50);
  const stroke = { arm: 'right', entry: 0, catch: 20, exit: 50, nextEntry: 70 } as const;
  const at = (frame: number, forePx = 200): FrameMark => {
    const share = (frame - 20) / 30;
    return onFrame(frame, {
      upperArmDeg: 90 - 140 * share,
      forearmDeg: 80 - 120 * share,
      upperPx: 200,
      forePx,
    });
  };
  const still = { ...context, view: 'front-above' as const };

  it('come from the frames that each measure was read from', () => {
    const marks = [20, 25, 30].map((frame) => at(frame)).concat(at(35, 100), at(40), at(45), at(50));
    const measures = strokeMeasures(stroke, marks, times, still);
    const [caution, ...rest] = strokeCautions(still, stroke, marks, measures);
    expect(rest).toEqual([]);
    expect(caution).toMatchObject({ code: 'foreshortened', arm: 'right', frames: [35] });
    expect(valueOf(measures.verticalAt).bracket).toContain(35);
    const [frame] = frameCautions(still, 'right', marks, [at(35, 100)]);
    expect(frame && sizeFor(frame, 'forearm')).toBe(caution && sizeFor(caution, 'verticalAt'));
    expect(frame && sizeFor(frame, 'elbow')).toBe(caution && sizeFor(caution, 'elbowAtMidPull'));
  });

  it('are none without marks, and pass over marks that cannot be read', () => {
    const none = strokeMeasures(stroke, [], times, still);
    expect(strokeCautions(still, stroke, [], none)).toEqual([]);
    const broken = { ...at(30), wrist: { x: NaN, y: 0 } };
    expect(frameCautions(context, 'left', [broken], [broken])).toEqual([]);
  });
});
