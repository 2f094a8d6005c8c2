import type { Clip } from '@stillstroke/contract/clip-facts';
import { DeskState, type DeskInput } from './desk-state';
import type { DeskMark } from './desk-mark';
import type { DeskStroke } from './desk-stroke';

/** Test data: a rendered stroke on each arm, and Desks built on it without any network. */

export const testClip: Clip = {
  id: '3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d11',
  sessionId: '3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d12',
  athleteId: '3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d13',
  name: 'lane-two.mp4',
  view: 'side-underwater',
  travel: 'right',
  stroke: 'full',
  captureRateFactor: 1,
  fieldOfView: null,
  plumb: { top: { x: 640, y: 60 }, bottom: { x: 640, y: 660 } },
  distance: null,
  status: 'ready',
  width: 1280,
  height: 720,
  frameCount: 300,
  durationUs: 5_000_000,
  frameRate: 60,
  codec: 'avc1.640028',
  container: 'mp4',
  sizeBytes: 1_000_000,
  sha256: '0'.repeat(64),
  jointUncertaintyPx: { shoulder: 2, elbow: 4 / 3, wrist: 4 / 3 },
  jointUncertaintyOwn: false,
  cutOff: false,
  hasPoster: true,
  markedFrames: 12,
  strokeCount: 2,
  createdAt: '2026-05-04T09:00:00.000Z',
  deletedAt: null,
};

/** Constant 60 frames a second, whole microseconds. */
export const testTimesUs: readonly number[] = Array.from({ length: 300 }, (_, frame) =>
  Math.round((frame * 1_000_000) / 60),
);

export const testStrokes: readonly DeskStroke[] = [
  stroke('3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d21', 'left', [10, 34, 64, 90], false),
  stroke('3f1f0a52-7c57-4a3b-9a5e-0c5f9f1c2d22', 'right', [50, 74, 104, 130], true),
];

/** A mark whose arm has these angles, swimming to the right under a level camera. */
export function markWith(
  arm: DeskMark['arm'],
  frame: number,
  angles: { readonly upperArmDeg: number; readonly forearmDeg: number },
): DeskMark {
  const shoulder = { x: 600, y: 250 };
  const elbow = along(shoulder, angles.upperArmDeg, 130);
  return { arm, frame, shoulder, elbow, wrist: along(elbow, angles.forearmDeg, 120) };
}

/** Six marks a stroke: the forearm turns from 80° ahead to 40° behind; at mid-pull the arm hangs straight down. */
export const testMarks: readonly DeskMark[] = testStrokes.flatMap(({ arm, entry, catch: caught, exit }) => {
  const [from, to] = [caught ?? entry, exit ?? entry];
  const frames = [entry, from, from + 10, from + 15, from + 20, to];
  const forearms = [80, 70, 40, 0, -20, -40];
  const upperArms = [85, 60, 30, 0, -20, -45];
  return frames.map((frame, at) =>
    markWith(arm, frame, { upperArmDeg: upperArms[at] ?? 0, forearmDeg: forearms[at] ?? 0 }),
  );
});

/** A Desk with two strokes, all their marks and a plumb; anything given replaces that part. */
export function deskState(given: Partial<DeskInput> = {}): DeskState {
  let made = 0;
  return new DeskState({
    clip: testClip,
    frameTimesUs: testTimesUs,
    strokes: testStrokes,
    marks: testMarks,
    canEdit: true,
    newId: () => `3f1f0a52-7c57-4a3b-9a5e-${String((made += 1)).padStart(12, '0')}`,
    ...given,
  });
}

/** A Desk on which nothing is set up, marked or timed. */
export function bareDesk(given: Partial<DeskInput> = {}): DeskState {
  return deskState({ clip: { ...testClip, plumb: null }, strokes: [], marks: [], ...given });
}

function stroke(
  id: string,
  arm: DeskStroke['arm'],
  events: readonly [number, number, number, number],
  breath: boolean,
): DeskStroke {
  const [entry, caught, exit, nextEntry] = events;
  return { id, arm, entry, catch: caught, exit, nextEntry, breath };
}

function along(from: { readonly x: number; readonly y: number }, deg: number, length: number) {
  const rad = (deg * Math.PI) / 180;
  return { x: from.x + length * Math.sin(rad), y: from.y + length * Math.cos(rad) };
}
