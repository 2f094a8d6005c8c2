import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { checkArmMark, type ArmMark, type FrameMark } from '@stillstroke/geometry/arm';
import { homography } from '@stillstroke/geometry/calibration/homography';
import { lengthScale } from '@stillstroke/geometry/calibration/length-scale';
import { leastSquares } from '@stillstroke/geometry/calibration/linear-solve';
import { measuredDistance, readOff, scaleCheck } from '@stillstroke/geometry/calibration/measured-distance';
import {
  checkKnown,
  checkScale,
  fitScale,
  type PictureScale,
} from '@stillstroke/geometry/calibration/picture-scale';
import { planeVector } from '@stillstroke/geometry/calibration/plane-vector';
import { bodyAxes, cameraRoll, rollUncertaintyDeg } from '@stillstroke/geometry/calibration/plumb';
import { checkQuad, type Quad } from '@stillstroke/geometry/calibration/quad';
import { flatPort, waterAngle } from '@stillstroke/geometry/calibration/refraction';
import { indexOfCoordination } from '@stillstroke/geometry/events/coordination';
import { elbowAtMidPull, elbowAtMidPullOf } from '@stillstroke/geometry/events/elbow-at-mid-pull';
import { frameTimeUs } from '@stillstroke/geometry/events/frame-times';
import { midPull, midPullBracket, midPullOf } from '@stillstroke/geometry/events/mid-pull';
import { peakDrop, peakDropOf } from '@stillstroke/geometry/events/peak-drop';
import { strokePhases } from '@stillstroke/geometry/events/phases';
import { pullMarks } from '@stillstroke/geometry/events/pull-marks';
import { checkOrder, framesToMark, pullSpan } from '@stillstroke/geometry/events/stroke';
import { checkKnownDistance, swimSpeed } from '@stillstroke/geometry/events/known-distance';
import { strokeLength } from '@stillstroke/geometry/events/stroke-length';
import { strokeRate } from '@stillstroke/geometry/events/stroke-rate';
import { verticalAt, verticalAtOf } from '@stillstroke/geometry/events/vertical-at';
import { measuredByName } from '@stillstroke/geometry/measures/measured-by-name';
import { strokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import type { Outcome } from '@stillstroke/geometry/outcome';
import { angleAtCorner } from '@stillstroke/geometry/points/corner-angle';
import { checkPoint, videoPoint } from '@stillstroke/geometry/points/video-point';
import { agreement } from '@stillstroke/geometry/statistics/agreement';
import { circularSummary } from '@stillstroke/geometry/statistics/circular';
import { coachAgreement } from '@stillstroke/geometry/statistics/coach-agreement';
import { compareArms } from '@stillstroke/geometry/statistics/compare-arms';
import { compareWithin } from '@stillstroke/geometry/statistics/compare-within';
import { hedgesG } from '@stillstroke/geometry/statistics/effect-size';
import { holm } from '@stillstroke/geometry/statistics/holm';
import { intraclass } from '@stillstroke/geometry/statistics/intraclass';
import { pairedDifference } from '@stillstroke/geometry/statistics/paired';
import {
  markingRepeatability,
  pooledSpread,
  testRetest,
} from '@stillstroke/geometry/statistics/repeatability';
import { summarise } from '@stillstroke/geometry/statistics/sample';
import { symmetryIndex } from '@stillstroke/geometry/statistics/symmetry';
import { welch, welchOf } from '@stillstroke/geometry/statistics/welch';
import { band, figureAgainstBand, relationToBand } from '@stillstroke/geometry/targets/band';
import { armOf, constantRate, onFrame, valueOf } from '@stillstroke/geometry/testing/arms';
import { sessionChange } from '@stillstroke/geometry/trend/change';
import { minimalChange } from '@stillstroke/geometry/trend/minimal-change';
import { robustSlope } from '@stillstroke/geometry/trend/robust-slope';
import { sessionMean } from '@stillstroke/geometry/trend/session-mean';
import { slopeOf } from '@stillstroke/geometry/trend/slope';
import { armAngleUncertainty } from '@stillstroke/geometry/uncertainty/arm-uncertainty';
import { checkJointUncertainty } from '@stillstroke/geometry/uncertainty/joint-uncertainty';
import { ownRepeatability, typicalErrors } from '@stillstroke/geometry/uncertainty/own-uncertainty';
import { degrees, radians } from '@stillstroke/geometry/units/angle';
import { frameIndex } from '@stillstroke/geometry/units/frame-index';
import { microseconds } from '@stillstroke/geometry/units/microseconds';
import { pixels } from '@stillstroke/geometry/units/pixels';
import { share } from '@stillstroke/geometry/units/share';
import { edgeRadius, portBending } from '@stillstroke/geometry/view/port-bending';

/** A function of the geometry library with input that it takes. */
export interface Door {
  readonly name: string;
  readonly input: readonly unknown[];
  readonly enter: (...input: unknown[]) => Outcome<unknown>;
}

function door<A extends readonly unknown[]>(
  name: string,
  enter: (...input: A) => Outcome<unknown>,
  ...input: A
): Door {
  return { name, input, enter: (...spoilt) => enter(...(spoilt as unknown as A)) };
}

const mark: ArmMark = armOf({ upperArmDeg: 60, forearmDeg: 20 });
const marks: FrameMark[] = [30, 40, 50, 60, 70].map((frame) =>
  onFrame(frame, { upperArmDeg: 90 - 3 * (frame - 30), forearmDeg: 75 - 3 * (frame - 30) }),
);
const plumb = { top: { x: 80, y: 100 }, bottom: { x: 84, y: 600 } };
const marking = {
  travel: 'right' as const,
  plumb,
  jointUncertaintyPx: { shoulder: 3, elbow: 2, wrist: 2 },
  plumbPointUncertaintyPx: 1.5,
};
const context = { ...marking, captureRateFactor: 0.5, verticalToleranceDeg: 15 };
const times = constantRate(200, 60);
const stroke = { entry: 10, catch: 30, exit: 70, nextEntry: 94 };
const arms = {
  right: [stroke, { entry: 94, catch: 114, exit: 154, nextEntry: 178 }],
  left: [{ entry: 52, catch: 72, exit: 112, nextEntry: 136 }],
};
const left = [10, 12, 11, 13.5];
const right = [14, 15.5, 13, 16];
const corners: Quad = [
  { x: 100, y: 500 },
  { x: 900, y: 540 },
  { x: 860, y: 140 },
  { x: 140, y: 160 },
];
const pairs = corners.map((picture, n) => ({
  picture,
  plane: { x: n === 1 || n === 2 ? 2 : 0, y: n > 1 ? 1 : 0 },
}));
const picture = { width: 1000, height: 600 };
const known = { from: { x: 100, y: 300 }, to: { x: 500, y: 310 }, metres: 2 };
const scale: PictureScale = { kind: 'length', plane: 'swimmer', ...known, uncertaintyM: 0.01 };
const fitted = valueOf(fitScale(scale, 1));
const placing = { from: 1, to: 1 };
const pull = valueOf(pullMarks(stroke, marks, times, context));
const measures = strokeMeasures(stroke, marks, times, context);
const sessionOf = (values: readonly number[]) => valueOf(sessionMean(values, { marking: 1, setUp: 0.5 }));
const points = [0, 30, 60, 95].map((x, n) => ({ x, y: 50 - n * 3 + (n % 2), uncertainty: 1 + n / 10 }));
const fieldOfView = { deg: 60, medium: 'water' as const };
const again = armOf({ upperArmDeg: 61, forearmDeg: 21 });
const placedTwice = [0, 1, 2].map(() => ({
  size: picture,
  axes: { travel: 'right' as const, plumb },
  first: mark,
  again,
}));
const twice = [mark, armOf({ upperArmDeg: 61, forearmDeg: 21 })];

const swum = { metres: 10, uncertaintyM: 0.05, fromFrame: 2, toFrame: 40 };

/** Where people's input comes in: each is tried with everything that can be wrong with it. */
export const doors: readonly Door[] = [
  door('angles/arm-angles.armAngles', armAngles, mark, { travel: 'right', plumb }),
  door('arm.checkArmMark', checkArmMark, mark),
  door('calibration/homography.homography', homography, pairs),
  door(
    'calibration/length-scale.lengthScale',
    lengthScale,
    known.from,
    known.to,
    { metres: 2, uncertaintyM: 0.01 },
    2,
  ),
  door('calibration/picture-scale.checkScale', checkScale, scale, picture),
  door('calibration/picture-scale.checkKnown', checkKnown, known, picture),
  door('calibration/plumb.cameraRoll', cameraRoll, plumb),
  door('calibration/plumb.rollUncertaintyDeg', (line: typeof plumb) => rollUncertaintyDeg(line, 1.5), plumb),
  door('calibration/plumb.bodyAxes', bodyAxes, plumb, 'right' as const),
  door('calibration/quad.checkQuad', (...four: Quad) => checkQuad(four), ...corners),
  door('calibration/refraction.flatPort', flatPort, 10),
  door('calibration/refraction.waterAngle', waterAngle, 0.2),
  door('events/coordination.indexOfCoordination', indexOfCoordination, arms, times),
  door('events/elbow-at-mid-pull.elbowAtMidPull', elbowAtMidPull, stroke, marks, times, context),
  door('events/frame-times.frameTimeUs', frameTimeUs, times, 12),
  door('events/mid-pull.midPull', midPull, stroke, marks, times, context),
  door('events/peak-drop.peakDrop', peakDrop, stroke, marks, times, context),
  door('events/phases.strokePhases', strokePhases, stroke, null, times, {
    captureRateFactor: 0.5,
  }),
  door('events/pull-marks.pullMarks', pullMarks, stroke, marks, times, marking),
  door('events/stroke.checkOrder', checkOrder, stroke, 200),
  door('events/stroke.pullSpan', pullSpan, stroke, times),
  door('events/stroke.framesToMark', framesToMark, stroke, times, 800_000),
  door('events/stroke-rate.strokeRate', strokeRate, [stroke], times, { captureRateFactor: 0.5 }),
  door('events/vertical-at.verticalAt', verticalAt, stroke, marks, times, context),
  door('points/corner-angle.angleAtCorner', angleAtCorner, mark.elbow, mark.shoulder, mark.wrist),
  door('points/video-point.checkPoint', checkPoint, mark.wrist),
  door('points/video-point.videoPoint', videoPoint, 3, 4),
  door('statistics/agreement.agreement', agreement, left, right),
  door('statistics/circular.circularSummary', circularSummary, [10, 350, 20], 360),
  door(
    'statistics/coach-agreement.coachAgreement',
    coachAgreement,
    left.map((first, at) => ({
      first,
      second: right[at] ?? first,
      firstUncertainty: 1,
      secondUncertainty: 2,
    })),
  ),
  door('statistics/compare-arms.compareArms', compareArms, left, right, {
    leftMarking: [1, 1, 1, 1],
    rightMarking: 1,
    common: 0.5,
  }),
  door('statistics/compare-within.compareWithin', compareWithin, [{ one: left, other: right, common: 0.5 }]),
  door('statistics/effect-size.hedgesG', hedgesG, left, right),
  door('statistics/holm.holm', holm, [0.01, 0.2, 0.03]),
  door('statistics/intraclass.intraclass', intraclass, [left, right, [9, 11, 14, 12]]),
  door('statistics/paired.pairedDifference', pairedDifference, left, right),
  door('statistics/repeatability.markingRepeatability', markingRepeatability, [twice, twice]),
  door('statistics/repeatability.pooledSpread', pooledSpread, [left, right]),
  door('statistics/repeatability.testRetest', testRetest, left, right),
  door('statistics/sample.summarise', summarise, left),
  door(
    'statistics/symmetry.symmetryIndex',
    symmetryIndex,
    { value: 50, uncertainty: 2 },
    { value: 45, uncertainty: 2 },
  ),
  door('statistics/welch.welch', welch, left, right),
  door('targets/band.band', band, 10, 20),
  door('targets/band.figureAgainstBand', figureAgainstBand, 12, 2, { low: 10, high: 20 }),
  door('targets/band.relationToBand', relationToBand, 12, { low: 10, high: 14 }, { low: 10, high: 20 }),
  door('trend/minimal-change.minimalChange', minimalChange, 2, 3),
  door('trend/robust-slope.robustSlope', robustSlope, points),
  door('trend/session-mean.sessionMean', sessionMean, left, { marking: [1, 1, 1, 1], setUp: 0.5 }),
  door('trend/slope.slopeOf', slopeOf, points),
  door('uncertainty/arm-uncertainty.armAngleUncertainty', armAngleUncertainty, mark, context),
  door(
    'uncertainty/joint-uncertainty.checkJointUncertainty',
    checkJointUncertainty,
    context.jointUncertaintyPx,
  ),
  door('uncertainty/own-uncertainty.ownRepeatability', ownRepeatability, placedTwice),
  door('uncertainty/own-uncertainty.typicalErrors', typicalErrors, placedTwice),
  door('units/angle.degrees', degrees, 3),
  door('units/angle.radians', radians, 3),
  door('units/frame-index.frameIndex', frameIndex, 3, 10),
  door('units/microseconds.microseconds', microseconds, 3),
  door('units/pixels.pixels', pixels, 3),
  door('units/share.share', share, 0.3),
  door('view/port-bending.edgeRadius', edgeRadius, fieldOfView),
  door('view/port-bending.portBending', portBending, mark.wrist, picture, fieldOfView),
  door('events/known-distance.checkKnownDistance', checkKnownDistance, swum, 100),
  door('events/known-distance.swimSpeed', swimSpeed, swum, times, { captureRateFactor: 0.5 }),
];

/** Further in, where only what a door has let through arrives: tried with that, and what they answer has no NaN either. */
export const inner: readonly Door[] = [
  door(
    'calibration/linear-solve.leastSquares',
    leastSquares,
    [
      [1, 0],
      [0, 2],
      [1, 1],
    ],
    [1, 2, 3],
  ),
  door(
    'calibration/measured-distance.readOff',
    readOff,
    fitted,
    [known.from, known.to],
    placing,
    (vector) => vector.metres,
  ),
  door(
    'calibration/measured-distance.measuredDistance',
    measuredDistance,
    fitted,
    known.from,
    known.to,
    placing,
  ),
  door('calibration/measured-distance.scaleCheck', scaleCheck, fitted, known, 1),
  door('calibration/picture-scale.fitScale', fitScale, scale, 1),
  door('calibration/plane-vector.planeVector', planeVector, fitted.toPlane, fitted.known, [
    known.from,
    known.to,
  ]),
  door('events/elbow-at-mid-pull.elbowAtMidPullOf', elbowAtMidPullOf, pull, times),
  door('events/mid-pull.midPullBracket', midPullBracket, pull),
  door('events/mid-pull.midPullOf', midPullOf, pull, times),
  door('events/peak-drop.peakDropOf', peakDropOf, pull),
  door('events/vertical-at.verticalAtOf', verticalAtOf, pull, times, context),
  door('measures/measured-by-name.measuredByName', measuredByName, 'strokeRate', measures),
  door(
    'events/stroke-length.strokeLength',
    strokeLength,
    valueOf(swimSpeed(swum, times)),
    valueOf(strokeRate([stroke], times)),
  ),
  door('statistics/welch.welchOf', welchOf, valueOf(summarise(left)), valueOf(summarise(right))),
  door('trend/change.sessionChange', sessionChange, sessionOf(left), sessionOf(right)),
];
