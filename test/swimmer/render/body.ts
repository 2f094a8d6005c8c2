import type { ArmPose, BodyPoint } from '../model/arm-motion';
import type { SwimmerPose } from '../model/swimmer-motion';
import { cross, dot, MATERIAL, Mesh, minus, plus, type Slice, times, unitVector, type Vector } from './loft';
import { ARM, LEG, THUMB, TRUNK } from './body-profiles';
import type { Look } from './look';

/** Places are (f, d, r): ahead, down, to the swimmer's right, metres. */
const RIGHTWARD: Vector = [0, 0, 1];

export function bodyMesh(pose: SwimmerPose, look: Look): Mesh {
  const mesh = new Mesh();
  const middle = (pose.arms.left.shoulder.f + pose.arms.right.shoulder.f) / 2;
  trunk(mesh, pose, look, middle);
  head(mesh, pose, look, middle);
  for (const side of [-1, 1] as const) {
    arm(mesh, side === 1 ? pose.arms.right : pose.arms.left, pose, look, middle, side);
    leg(mesh, pose, look, side);
  }
  return mesh;
}

/** The two half axes of the trunk at a place along it: shoulders roll all the way, hips about half. */
function trunkAxes(pose: SwimmerPose, place: number): { across: Vector; over: Vector } {
  const share = Math.min(1, Math.max(0.5, 1 + (place + 0.05) * 0.9));
  const roll = (pose.rollDeg * share * Math.PI) / 180;
  return { across: [0, Math.sin(roll), Math.cos(roll)], over: [0, Math.cos(roll), -Math.sin(roll)] };
}

function trunkMiddle(pose: SwimmerPose, place: number, hang: number, middle: number): Vector {
  const share = Math.min(1, Math.max(0, 1 + place / 0.7));
  return [place + middle * share, pose.depth * share + 0.085 * (1 - share) + hang, 0];
}

function trunk(mesh: Mesh, pose: SwimmerPose, look: Look, middle: number): void {
  const slices = TRUNK.map(([place, width, thick, hang]): Slice => {
    const { across, over } = trunkAxes(pose, place);
    return {
      centre: trunkMiddle(pose, place, hang, middle),
      across: times(across, width),
      over: times(over, thick),
      place,
    };
  });
  mesh.loft(smooth(slices), { material: MATERIAL.torso, colour: look.skin }, 26);
}

function vector(point: BodyPoint): Vector {
  return [point.f, point.d, point.r];
}

function arm(mesh: Mesh, pose: ArmPose, body: SwimmerPose, look: Look, middle: number, side: 1 | -1): void {
  const chain = [vector(pose.shoulder), vector(pose.elbow), vector(pose.wrist), vector(pose.fingertips)];
  const surface = { material: MATERIAL.plain, colour: look.skin };
  mesh.loft(smooth(limbSlices(chain, ARM, 0.55 * side)), surface, 16);
  const wrist = chain[2] ?? [0, 0, 0];
  const tips = chain[3] ?? [0, 0, 0];
  const handward = unitVector(minus(tips, wrist));
  const inward: Vector = unitVector(
    minus(times(RIGHTWARD, -side), times(handward, dot(RIGHTWARD, handward) * -side)),
  );
  const root = plus(wrist, plus(times(handward, 0.035), times(inward, 0.022)));
  const tip = plus(root, plus(times(handward, 0.055), times(inward, 0.032)));
  mesh.loft(smooth(limbSlices([root, tip], THUMB)), surface, 8);
  joinShoulder(mesh, chain[0] ?? [0, 0, 0], body, look, middle, side);
}

/** Muscle between the arm and the trunk, so that a shoulder reaching ahead does not come off: to the chest and to the back. */
function joinShoulder(
  mesh: Mesh,
  shoulder: Vector,
  body: SwimmerPose,
  look: Look,
  middle: number,
  side: 1 | -1,
): void {
  const surface = { material: MATERIAL.plain, colour: look.skin };
  for (const [place, out, radius] of [
    [-0.15, 0.085, 0.078],
    [0.02, 0.08, 0.06],
  ] as const) {
    const { across } = trunkAxes(body, place);
    const root = plus(trunkMiddle(body, place, 0.012, middle), times(across, out * side));
    const slices: Slice[] = limbSlices(
      [shoulder, root],
      [
        [-0.16, 0.03, 0.03],
        [0, 0.06, 0.064],
        [0.4, 0.064, 0.07],
        [1, radius, radius],
        [1.15, 0.01, 0.01],
      ],
    );
    mesh.loft(smooth(slices), surface, 14);
  }
}

type Profile = readonly (readonly [number, number, number])[];

/**
 * Slices of a limb along a chain of joints; the axis "across" stays as level as it can, but for `twist` radians that come in
 * beyond the middle joint.
 */
function limbSlices(chain: readonly Vector[], profile: Profile, twist = 0): Slice[] {
  let place = 0;
  let before: Vector | undefined;
  return profile.map(([at, width, thick]) => {
    const segment = Math.max(0, Math.min(chain.length - 2, Math.floor(at)));
    const from = chain[segment] ?? [0, 0, 0];
    const to = chain[segment + 1] ?? from;
    const centre = plus(from, times(minus(to, from), at - segment));
    const ahead = directionAt(chain, at);
    const across = unitVector(minus(RIGHTWARD, times(ahead, dot(RIGHTWARD, ahead))));
    if (before) place += Math.sqrt(dot(minus(centre, before), minus(centre, before)));
    before = centre;
    const level = cross(ahead, across);
    const turn = twist * Math.max(0, Math.min(1, at - 1));
    const turnedAcross = plus(times(across, Math.cos(turn)), times(level, Math.sin(turn)));
    return {
      centre,
      across: times(turnedAcross, width),
      over: times(cross(ahead, turnedAcross), thick),
      place,
    };
  });
}

/** Direction of the chain, turning over the last and first tenth on either side of a joint. */
function directionAt(chain: readonly Vector[], at: number): Vector {
  const of = (segment: number): Vector => {
    const index = Math.max(0, Math.min(chain.length - 2, segment));
    return unitVector(minus(chain[index + 1] ?? [1, 0, 0], chain[index] ?? [0, 0, 0]));
  };
  const joint = Math.round(at);
  const reach = 0.12;
  const share = Math.max(0, Math.min(1, (at - joint + reach) / (2 * reach)));
  return unitVector(plus(times(of(joint - 1), 1 - share), times(of(joint), share)));
}

function leg(mesh: Mesh, pose: SwimmerPose, look: Look, side: 1 | -1): void {
  const beat = 2 * Math.PI * (pose.kick + (side === 1 ? 0 : 0.5));
  const thigh = 0.1 + 0.13 * Math.sin(beat);
  const shin = thigh - 0.17 + 0.2 * Math.sin(beat - 1.1);
  const foot = shin - 0.04 + 0.24 * Math.sin(beat - 1.9);
  const { across, over } = trunkAxes(pose, -0.62);
  const hip = plus(plus(trunkMiddle(pose, -0.63, 0.046, 0), times(across, 0.083 * side)), times(over, 0.004));
  const step = (from: Vector, angle: number, length: number, inward: number): Vector =>
    plus(from, [-length * Math.cos(angle), length * Math.sin(angle), -side * inward]);
  const knee = step(hip, thigh, 0.43, 0.018);
  const ankle = step(knee, shin, 0.42, 0.012);
  const toes = step(ankle, foot, 0.21, 0.01);
  mesh.loft(
    smooth(limbSlices([hip, knee, ankle, toes], LEG)),
    { material: MATERIAL.leg, colour: look.skin },
    18,
  );
}

function head(mesh: Mesh, pose: SwimmerPose, look: Look, middle: number): void {
  const turn = (pose.headTurnDeg * Math.PI) / 180;
  const nod = 0.42;
  const turned = (f: number, d: number, r: number): Vector => [
    f,
    d * Math.cos(turn) - r * Math.sin(turn),
    d * Math.sin(turn) + r * Math.cos(turn),
  ];
  const crown = turned(Math.cos(nod), -Math.sin(nod), 0);
  const face = turned(Math.sin(nod), Math.cos(nod), 0);
  const side = turned(0, 0, 1);
  const lift = Math.abs(Math.sin(turn)) * 0.02;
  const centre: Vector = [0.225 + middle, pose.depth - 0.005 - lift + 0.02, 0];
  const surface = { material: MATERIAL.head, colour: look.skin };
  const at = (c: number, n: number, s: number): Vector =>
    plus(centre, plus(times(crown, c), plus(times(face, n), times(side, s))));
  mesh.ellipsoid(centre, [times(crown, 0.118), times(face, 0.1), times(side, 0.079)], surface, 26, 32);
  const plain = { material: MATERIAL.plain, colour: look.skin };
  mesh.ellipsoid(
    at(-0.062, 0.036, 0),
    [times(crown, 0.064), times(face, 0.062), times(side, 0.058)],
    plain,
    14,
    18,
  );
  mesh.ellipsoid(
    at(-0.005, 0.1, 0),
    [times(crown, 0.028), times(face, 0.02), times(side, 0.013)],
    plain,
    8,
    10,
  );
  for (const eye of [-1, 1]) {
    const lens = { material: MATERIAL.plain, colour: [0.006, 0.012, 0.02] as const };
    mesh.ellipsoid(
      at(0.03, 0.086, 0.032 * eye),
      [times(crown, 0.019), times(face, 0.019), times(side, 0.027)],
      lens,
      10,
      12,
    );
  }
}

/** More slices between those given, on a smooth line through them. */
function smooth(slices: readonly Slice[], between = 2): Slice[] {
  return slices.flatMap((slice, index) => {
    const next = slices[index + 1];
    if (!next) return [slice];
    const before = slices[index - 1] ?? slice;
    const after = slices[index + 2] ?? next;
    return Array.from({ length: between }, (_, step): Slice => {
      const s = step / between;
      const through = (pick: (of: Slice) => Vector): Vector =>
        spline(pick(before), pick(slice), pick(next), pick(after), s);
      return {
        centre: plus(slice.centre, times(minus(next.centre, slice.centre), s)),
        across: through((of) => of.across),
        over: through((of) => of.over),
        place: slice.place + (next.place - slice.place) * s,
      };
    });
  });
}

function spline(before: Vector, from: Vector, to: Vector, after: Vector, s: number): Vector {
  const at = (axis: 0 | 1 | 2): number => {
    const p = [before[axis], from[axis], to[axis], after[axis]] as const;
    const low = (p[2] - p[0]) / 2;
    const high = (p[3] - p[1]) / 2;
    return (
      p[1] * (2 * s ** 3 - 3 * s ** 2 + 1) +
      low * (s ** 3 - 2 * s ** 2 + s) +
      p[2] * (3 * s ** 2 - 2 * s ** 3) +
      high * (s ** 3 - s ** 2)
    );
  };
  return [at(0), at(1), at(2)];
}
