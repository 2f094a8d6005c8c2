import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Session } from '@stillstroke/contract/sessions';

/** Invented things for specs, with what a test is not about filled in. */

const uuid = (last: number) => `00000000-0000-4000-8000-${String(last).padStart(12, '0')}`;

export const ids = {
  session: uuid(1),
  otherSession: uuid(2),
  athlete: uuid(3),
  squad: uuid(4),
  clip: uuid(5),
  otherClip: uuid(6),
};

export function madeClip(more: Partial<Clip> = {}): Clip {
  return {
    id: ids.clip,
    sessionId: ids.session,
    athleteId: ids.athlete,
    name: 'lane-four.mp4',
    view: 'side-underwater',
    travel: 'right',
    stroke: 'full',
    captureRateFactor: 1,
    fieldOfView: null,
    plumb: null,
    distance: null,
    status: 'ready',
    width: 1920,
    height: 1080,
    frameCount: 1488,
    durationUs: 24_800_000,
    frameRate: 60,
    codec: 'avc',
    container: 'mp4',
    sizeBytes: 38_400_000,
    sha256: 'f'.repeat(64),
    jointUncertaintyPx: { shoulder: 3, elbow: 2, wrist: 2 },
    jointUncertaintyOwn: false,
    cutOff: false,
    hasPoster: false,
    markedFrames: 0,
    strokeCount: 0,
    createdAt: '2026-11-28T10:00:00.000Z',
    deletedAt: null,
    ...more,
  };
}

export function madeSession(more: Partial<Session> = {}): Session {
  return {
    id: ids.session,
    athleteId: ids.athlete,
    athleteName: 'Ines Corrow',
    squadId: ids.squad,
    squadName: 'Masters squad',
    date: '2026-11-28',
    place: 'Tarn pool',
    note: null,
    clips: [],
    summary: { strokes: { left: 0, right: 0 }, verticalAt: { left: null, right: null } },
    deletedAt: null,
    ...more,
  };
}
