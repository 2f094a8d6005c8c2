import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Arm } from '@stillstroke/contract/strokes';
import { putMark } from '../marks/marks.service';
import type { AppContext } from '../platform/context';
import type { ClubIds } from '../platform/test-club';
import { createStroke } from '../strokes/strokes.service';

/** The test club's coach, for tests that call services rather than the API. */
export function coachOf(ids: ClubIds): SignedInUser {
  return {
    id: ids.users.coach,
    name: 'The coach',
    email: 'coach@tarn.example',
    role: 'coach',
    clubId: ids.clubs.tarnValley,
    clubName: 'Tarn Valley Swim Club',
    athleteId: null,
  };
}

export interface StrokeWish {
  readonly arm: Arm;
  readonly entry: number;
  readonly breath?: boolean;
  /** Share of the pull at which the forearm comes within 15° of vertical; above a third, below 1: half a turn has no shorter way. */
  readonly verticalAt: number;
}

/** Frames from entry to catch, exit and next entry. */
const CATCH = 20;
const EXIT = 60;
export const STROKE_FRAMES = 80;

/**
 * Enters a stroke whose forearm turns evenly from 75° at the catch: marks at the catch and at the exit, and the turn so
 * fast that 15° are met where wished. The wrist passes under the shoulder on the way.
 */
export function enterStroke(
  context: AppContext,
  user: SignedInUser,
  clipId: string,
  wish: StrokeWish,
): string {
  const { arm, entry, breath = false, verticalAt } = wish;
  for (const [frame, forearmDeg, upperArmDeg] of [
    [entry + CATCH, 75, 80],
    [entry + EXIT, 75 - 60 / verticalAt, -60],
  ] as const) {
    putMark(context, user, { id: clipId, arm, frame }, armAt(forearmDeg, upperArmDeg));
  }
  return createStroke(context, user, clipId, {
    arm,
    entry,
    catch: entry + CATCH,
    exit: entry + EXIT,
    nextEntry: entry + STROKE_FRAMES,
    breath,
  }).id;
}

/** An arm travelling right: angles from the plumb, ahead positive. */
function armAt(forearmDeg: number, upperArmDeg: number) {
  const shoulder = { x: 900, y: 300 };
  const from = (start: { x: number; y: number }, deg: number, length: number) => ({
    x: start.x + length * Math.sin((deg * Math.PI) / 180),
    y: start.y + length * Math.cos((deg * Math.PI) / 180),
  });
  const elbow = from(shoulder, upperArmDeg, 200);
  return { shoulder, elbow, wrist: from(elbow, forearmDeg, 180) };
}
