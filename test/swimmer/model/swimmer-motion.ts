import { armMotion, type ArmPose, type BodyPoint } from './arm-motion';
import { type ArmSide, type Breath, planStrokes, type StrokePlan } from './stroke-times';
import type { SwimmerStyle } from './style';

/** The whole swimmer at one instant. */
export interface SwimmerPose {
  readonly arms: Readonly<Record<ArmSide, ArmPose>>;
  /** Degrees about the long axis, + right shoulder down. */
  readonly rollDeg: number;
  /** Depth of the middle between the shoulders, metres. */
  readonly depth: number;
  /** Turn of the head against the pool, degrees, + face to the swimmer's right. */
  readonly headTurnDeg: number;
  /** Place in the kick, cycles: six beats to a stroke cycle. */
  readonly kick: number;
}

export interface SwimmerMotion {
  readonly plan: StrokePlan;
  readonly poseAt: (timeS: number) => SwimmerPose;
}

/** Shoulder to shoulder, metres. */
const SHOULDERS_M = 0.37;
const HEAD_TURN_DEG = 88;

/** The swimmer of a style over a film. Times are seconds of the film. */
export function swimmerMotion(style: SwimmerStyle, durationS: number, firstEntryS = 0.1): SwimmerMotion {
  const plan = planStrokes(style, durationS, firstEntryS);
  const left = armMotion(plan.strokes.left);
  const right = armMotion(plan.strokes.right);
  return {
    plan,
    poseAt: (timeS) => {
      const flat = { left: left(timeS), right: right(timeS) };
      const lean = (flat.right.shoulder.d - flat.left.shoulder.d) / SHOULDERS_M;
      const roll = Math.asin(Math.max(-0.9, Math.min(0.9, lean)));
      const narrower = (SHOULDERS_M / 2) * (1 - Math.cos(roll));
      return {
        arms: { left: sideways(flat.left, narrower), right: sideways(flat.right, -narrower) },
        rollDeg: (roll * 180) / Math.PI,
        depth: (flat.left.shoulder.d + flat.right.shoulder.d) / 2,
        headTurnDeg: headTurn(plan.breaths, timeS),
        kick: cyclesAt(plan, timeS) * 3,
      };
    },
  };
}

/** The arm moved to the swimmer's right by so many metres. */
function sideways(arm: ArmPose, by: number): ArmPose {
  const moved = (point: BodyPoint): BodyPoint => ({ ...point, r: point.r + by });
  const { shoulder, elbow, wrist, fingertips } = arm;
  return {
    ...arm,
    shoulder: moved(shoulder),
    elbow: moved(elbow),
    wrist: moved(wrist),
    fingertips: moved(fingertips),
  };
}

function headTurn(breaths: readonly Breath[], timeS: number): number {
  const breath = breaths.find(({ fromS, toS }) => timeS > fromS && timeS < toS);
  if (!breath) return 0;
  const share = (timeS - breath.fromS) / (breath.toS - breath.fromS);
  const open = Math.min(1, Math.sin(Math.PI * share) * 1.35);
  return (breath.side === 'right' ? 1 : -1) * HEAD_TURN_DEG * open * open * (3 - 2 * open);
}

/** Stroke cycles done by the left arm, growing evenly within each cycle. */
function cyclesAt({ strokes }: StrokePlan, timeS: number): number {
  const index = strokes.left.findLastIndex(({ entryS }) => entryS <= timeS);
  const stroke = strokes.left[index];
  if (!stroke) return 0;
  return index + (timeS - stroke.entryS) / (stroke.nextEntryS - stroke.entryS);
}
