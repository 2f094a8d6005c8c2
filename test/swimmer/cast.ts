import type { Camera } from './model/camera';
import { earlyPull, latePull, sameAlways, STEADY, swimmerStyle } from './model/pulls';
import type { SwimmerStyle } from './model/style';
import { colour, type Look } from './render/look';
import type { FilmPlan } from './render/scene';

/** A film to be made: its file (without ending), where it goes, and all it is drawn from. */
export interface Film extends FilmPlan {
  readonly name: string;
  readonly folder: 'demo' | 'proof';
  /** x264's constant rate factor. */
  readonly quality: number;
}

const DEEP_SKIN = colour(120, 78, 58);
const TAN_SKIN = colour(188, 130, 98);
const FAIR_SKIN = colour(222, 170, 138);
const CHALK = colour(236, 238, 232);

function look(parts: Partial<Look> & Pick<Look, 'skin' | 'suit' | 'cap'>): Look {
  return { suitCut: 'one-piece', laneLine: colour(222, 58, 48), laneMark: CHALK, green: 0.15, ...parts };
}

const INES_LOOK = look({ skin: TAN_SKIN, suit: colour(22, 30, 56), cap: colour(244, 244, 238) });
const TOMAS_LOOK = look({
  skin: FAIR_SKIN,
  suit: colour(120, 22, 36),
  cap: colour(28, 92, 168),
  suitCut: 'trunks',
  laneLine: colour(32, 104, 190),
  green: 0.3,
});
const RHONA_LOOK = look({ skin: FAIR_SKIN, suit: colour(18, 86, 84), cap: colour(240, 150, 40) });
const JAKUB_LOOK = look({
  skin: TAN_SKIN,
  suit: colour(24, 24, 28),
  cap: colour(206, 48, 44),
  suitCut: 'trunks',
  green: 0.55,
});
const MINA_LOOK = look({
  skin: DEEP_SKIN,
  suit: colour(70, 28, 92),
  cap: colour(246, 206, 70),
  laneLine: colour(240, 190, 60),
});
const WREN_LOOK = look({ skin: FAIR_SKIN, suit: colour(200, 70, 40), cap: colour(40, 150, 190), green: 0.4 });
const PETRA_LOOK = look({
  skin: FAIR_SKIN,
  suit: colour(30, 30, 34),
  cap: colour(60, 170, 120),
  laneLine: colour(24, 140, 90),
  green: 0.85,
});

interface Shot {
  readonly name: string;
  readonly seconds: number;
  readonly style: SwimmerStyle;
  readonly look: Look;
  readonly rollDeg: number;
  readonly folder?: Film['folder'];
  readonly travel?: Camera['travel'];
  readonly view?: Camera['view'];
  readonly width?: number;
  readonly framesPerSecond?: number;
  readonly quality?: number;
}

function film(shot: Shot): Film {
  const {
    name,
    style,
    seconds,
    rollDeg,
    travel = 'right',
    view = 'side-underwater',
    width = 800,
    framesPerSecond = 30,
  } = shot;
  const height = (width * 9) / 16;
  const side = view === 'side-underwater';
  const camera: Camera = {
    view,
    travel,
    width,
    height,
    rollDeg,
    pixelsPerM: width / (side ? 2.7 : 2.3),
    depthM: side ? 0.39 : 0.42,
    aheadShare: 0.56,
  };
  return {
    name,
    folder: shot.folder ?? 'demo',
    quality: shot.quality ?? 25,
    style,
    camera,
    look: shot.look,
    frames: Math.round(seconds * framesPerSecond),
    framesPerSecond,
    cord: { x: (travel === 'right' ? 0.458 : -0.458) * width, y: 0.3 * height },
  };
}

const inesLeft = sameAlways(earlyPull(0.34));
function inesStyle(seed: number, late: number, dropPlain: number, dropBreathing: number): SwimmerStyle {
  return swimmerStyle({
    seed,
    arms: {
      left: inesLeft,
      right: { plain: latePull(late - 0.03, dropPlain), breathing: latePull(late + 0.03, dropBreathing) },
    },
  });
}

const tomasArm = sameAlways(earlyPull(0.44, 78));
function rhonaStyle(seed: number, verticalAt: number, drop: number): SwimmerStyle {
  const arm = sameAlways(latePull(verticalAt, drop, 78));
  return swimmerStyle({
    seed,
    periodS: 1.44,
    arms: { left: arm, right: arm },
    breathing: { side: 'right', every: 2, first: 1 },
  });
}

/**
 * The films of the demo club, and one that is not in the demo for the end-to-end test. What each swimmer does is told here
 * and nowhere else; the files of true values beside the films are computed from it.
 */
export const CAST: readonly Film[] = [
  film({
    name: 'ines-november',
    seconds: 9,
    style: inesStyle(7, 0.58, 3, 11),
    look: INES_LOOK,
    rollDeg: 1.4,
    width: 960,
    framesPerSecond: 50,
    quality: 24,
  }),
  film({
    name: 'lane-four',
    folder: 'proof',
    seconds: 5.4,
    style: swimmerStyle({
      seed: 77,
      periodS: 1.3,
      arms: { left: sameAlways(earlyPull(0.4)), right: sameAlways(latePull(0.55, 6)) },
    }),
    look: look({ skin: DEEP_SKIN, suit: colour(150, 40, 30), cap: colour(245, 245, 240) }),
    rollDeg: -1.8,
    width: 960,
  }),
  film({
    name: 'tomas-autumn',
    seconds: 7,
    style: swimmerStyle({
      seed: 21,
      periodS: 1.3,
      arms: { left: tomasArm, right: tomasArm },
      breathing: { side: 'right', every: 3, first: 0 },
    }),
    look: TOMAS_LOOK,
    rollDeg: -1.1,
    travel: 'left',
  }),
  film({ name: 'rhona-june', seconds: 7, style: rhonaStyle(31, 0.63, 7), look: RHONA_LOOK, rollDeg: 2.1 }),
  film({
    name: 'rhona-november',
    seconds: 7,
    style: rhonaStyle(33, 0.47, -6),
    look: RHONA_LOOK,
    rollDeg: 1.2,
  }),
  film({ name: 'ines-july', seconds: 7, style: inesStyle(3, 0.69, 7, 14), look: INES_LOOK, rollDeg: -1.6 }),
  film({ name: 'rhona-august', seconds: 7, style: rhonaStyle(32, 0.55, 1), look: RHONA_LOOK, rollDeg: -0.9 }),
  film({
    name: 'mina-front',
    view: 'front-underwater',
    seconds: 6,
    style: swimmerStyle({
      seed: 51,
      periodS: 1.5,
      arms: { left: sameAlways(earlyPull(0.4)), right: sameAlways(earlyPull(0.42)) },
    }),
    look: MINA_LOOK,
    rollDeg: 1.6,
  }),
  film({
    name: 'jakub-autumn',
    seconds: 6.4,
    framesPerSecond: 25,
    style: swimmerStyle({
      seed: 41,
      periodS: 1.22,
      arms: { left: sameAlways(latePull(0.58, 2)), right: sameAlways(latePull(0.6, 3)) },
      spread: { ...STEADY, verticalAt: 0.035 },
    }),
    look: JAKUB_LOOK,
    rollDeg: 1.9,
    travel: 'left',
  }),
  film({ name: 'ines-october', seconds: 7, style: inesStyle(5, 0.62, 5, 12), look: INES_LOOK, rollDeg: 0.8 }),
  film({
    name: 'petra-autumn',
    seconds: 6.4,
    framesPerSecond: 25,
    style: swimmerStyle({
      seed: 61,
      periodS: 1.4,
      arms: { left: sameAlways(latePull(0.52, -2)), right: sameAlways(earlyPull(0.4)) },
    }),
    look: PETRA_LOOK,
    rollDeg: -1.3,
  }),
  film({
    name: 'wren-autumn',
    seconds: 6,
    framesPerSecond: 25,
    style: swimmerStyle({
      seed: 71,
      periodS: 1.18,
      arms: { left: sameAlways(earlyPull(0.46)), right: sameAlways(earlyPull(0.43)) },
      breathing: { side: 'right', every: 3, first: 0 },
    }),
    look: WREN_LOOK,
    rollDeg: 0.9,
    width: 640,
  }),
  film({
    name: 'ines-november-back',
    seconds: 5.4,
    style: inesStyle(8, 0.58, 3, 11),
    look: INES_LOOK,
    rollDeg: -0.7,
    travel: 'left',
  }),
];
