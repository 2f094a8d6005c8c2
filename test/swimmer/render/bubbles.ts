import type { BodyPoint } from '../model/arm-motion';
import type { SwimmerMotion } from '../model/swimmer-motion';
import { POOL } from './look';

/** A bubble: place beside the swimmer (metres), radius (metres), how solid it looks (0 to 1). */
export interface Bubble {
  readonly f: number;
  readonly d: number;
  readonly r: number;
  readonly radius: number;
  readonly solid: number;
}

interface Spring {
  readonly seed: number;
  readonly perSecond: number;
  readonly lifeS: number;
  /** Where it comes out at an instant; null when nothing comes. `lot` gives chance numbers of this bubble. */
  readonly from: (timeS: number, lot: (index: number) => number) => BodyPoint | null;
  readonly radius: (lot: (index: number) => number) => number;
  readonly spread: number;
  /** How long the body drags it down and along before it is left to rise, seconds. */
  readonly draggedS: number;
}

/** All bubbles to be seen at an instant: each is a function of when it came out, so frames can be drawn in any order. */
export function bubblesAt(motion: SwimmerMotion, timeS: number): Bubble[] {
  return springs(motion).flatMap((spring) => {
    const last = Math.floor(timeS * spring.perSecond);
    const first = Math.ceil((timeS - spring.lifeS) * spring.perSecond);
    const bubbles: Bubble[] = [];
    for (let number = first; number <= last; number += 1) {
      const lot = (index: number): number => chance(spring.seed, number, index);
      const bubble = one(spring, number / spring.perSecond, timeS, lot);
      if (bubble) bubbles.push(bubble);
    }
    return bubbles;
  });
}

function one(spring: Spring, bornS: number, timeS: number, lot: (index: number) => number): Bubble | null {
  const from = spring.from(bornS, lot);
  const age = timeS - bornS;
  const life = spring.lifeS * (0.35 + 0.65 * lot(9));
  if (!from || age > life) return null;
  const radius = spring.radius(lot);
  const rise =
    (0.1 + 11 * radius + 0.1 * lot(5)) * Math.max(0, age - spring.draggedS) -
    0.3 * spring.draggedS * (1 - Math.exp(-age / 0.12));
  const sway = 0.012 * Math.sin(9 * age + 6.28 * lot(6));
  const carry = 0.06 + spring.draggedS * 0.5;
  // A bubble is carried along for a moment, then stays behind in the water while the swimmer goes on.
  const behind = POOL.swimSpeed * (age - carry * (1 - Math.exp(-age / carry)));
  const d = from.d + (lot(2) - 0.5) * spring.spread - rise;
  if (d < 0.012 + radius) return null;
  return {
    f: from.f - behind + (lot(1) - 0.5) * spring.spread + sway,
    d,
    r: from.r + (lot(3) - 0.5) * spring.spread,
    radius,
    solid: (0.35 + 0.5 * lot(4)) * Math.min(1, (life - age) / (0.3 * life)),
  };
}

function springs(motion: SwimmerMotion): Spring[] {
  const small = (lot: (index: number) => number): number => 0.0026 + 0.0115 * lot(7) ** 4;
  const hands = (['left', 'right'] as const).map((arm, index): Spring => {
    const strokes = motion.plan.strokes[arm];
    return {
      seed: 11 + index,
      perSecond: 640,
      lifeS: 1.0,
      spread: 0.055,
      draggedS: 0.22,
      radius: small,
      from: (timeS, lot) => {
        const stroke = strokes.findLast(({ entryS }) => entryS <= timeS);
        if (!stroke) return null;
        const since = timeS - stroke.entryS;
        if (lot(8) > Math.exp(-since / 0.2))
          return lot(8) > 0.965 && timeS < stroke.exitS ? handAt(motion, arm, timeS, lot(0)) : null;
        return handAt(motion, arm, timeS, lot(0));
      },
    };
  });
  const mouth: Spring = {
    seed: 31,
    perSecond: 90,
    lifeS: 0.9,
    draggedS: 0.05,
    spread: 0.03,
    radius: (lot) => 0.003 + 0.014 * lot(7) ** 3,
    from: (timeS, lot) => {
      const { headTurnDeg, depth } = motion.poseAt(timeS);
      const puff = 0.35 + 0.65 * Math.max(0, Math.sin(timeS * 7.3)) ** 2;
      if (Math.abs(headTurnDeg) > 55 || lot(8) > puff) return null;
      const turn = (headTurnDeg * Math.PI) / 180;
      return { f: 0.235, d: depth + 0.125 * Math.cos(turn), r: 0.12 * Math.sin(turn) };
    },
  };
  const feet: Spring = {
    seed: 41,
    perSecond: 420,
    lifeS: 0.5,
    draggedS: 0.05,
    spread: 0.1,
    radius: small,
    from: (_, lot) => ({ f: -1.5 - 0.3 * lot(0), d: 0.03 + 0.13 * lot(8) ** 2, r: (lot(10) - 0.5) * 0.3 }),
  };
  const bow: Spring = {
    seed: 51,
    perSecond: 140,
    lifeS: 0.7,
    draggedS: 0.05,
    spread: 0.03,
    radius: small,
    from: (_, lot) => ({ f: 0.3 - 0.15 * lot(0), d: 0.02 + 0.045 * lot(8) ** 2, r: (lot(10) - 0.5) * 0.3 }),
  };
  return [...hands, mouth, feet, bow];
}

function handAt(motion: SwimmerMotion, arm: 'left' | 'right', timeS: number, share: number): BodyPoint {
  const { wrist, fingertips } = motion.poseAt(timeS).arms[arm];
  const mix = (from: number, to: number): number => from + (to - from) * share;
  return { f: mix(wrist.f, fingertips.f), d: mix(wrist.d, fingertips.d), r: mix(wrist.r, fingertips.r) };
}

/** A number in [0, 1) that depends on nothing but its three arguments. */
function chance(seed: number, number: number, index: number): number {
  let mixed =
    Math.imul(seed + 1, 0x9e3779b1) ^
    Math.imul(number + 0x1000, 0x85ebca6b) ^
    Math.imul(index + 1, 0xc2b2ae35);
  mixed = Math.imul(mixed ^ (mixed >>> 15), 0x2c1b3c6d);
  mixed = Math.imul(mixed ^ (mixed >>> 12), 0x297a2d39);
  return ((mixed ^ (mixed >>> 15)) >>> 0) / 2 ** 32;
}
