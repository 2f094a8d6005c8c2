import type { MarkingRoundWithMarks } from '@stillstroke/contract/repeatability';
import { testClip, testTimesUs } from '../desk/state/testing';
import { RoundDesk } from './round-desk';

const joints = { shoulder: { x: 600, y: 250 }, elbow: { x: 700, y: 300 }, wrist: { x: 760, y: 390 } };

function round(again: readonly boolean[] = [false, false, false]): MarkingRoundWithMarks {
  const places = [
    { arm: 'left', frame: 84 },
    { arm: 'right', frame: 30 },
    { arm: 'right', frame: 84 },
  ] as const;
  return {
    id: 'round-1',
    clipId: testClip.id,
    clipName: testClip.name,
    sessionId: testClip.sessionId,
    athleteName: 'Ines Corrow',
    createdAt: '2026-03-03T18:00:00.000Z',
    finishedAt: null,
    frames: 3,
    marked: again.filter(Boolean).length,
    own: 3,
    marks: places.map((place, position) => ({ ...place, position, again: again[position] ? joints : null })),
  };
}

const deskOf = (given = round()) => new RoundDesk(given, testClip, testTimesUs);

function place(desk: RoundDesk): void {
  for (const joint of ['shoulder', 'elbow', 'wrist'] as const) desk.state.marking.placeJoint(joints[joint]);
}

describe('a round of marking again', () => {
  it('shows one frame and arm after the other, and goes on only from a whole mark', () => {
    const desk = deskOf();
    expect([desk.position(), desk.state.frame(), desk.arm()]).toEqual([0, 84, 'left']);
    expect(desk.next()).toBe(false);
    expect(desk.position()).toBe(0);
    place(desk);
    expect(desk.next()).toBe(true);
    expect([desk.position(), desk.state.frame(), desk.arm()]).toEqual([1, 30, 'right']);
    desk.back();
    expect([desk.position(), desk.complete()]).toEqual([0, true]);
  });

  it('never shows a mark of another place, on the same frame neither', () => {
    const desk = deskOf(round([true, true, false]));
    expect([desk.position(), desk.state.frame()]).toEqual([2, 84]);
    expect(desk.state.marks().size).toBe(0);
    desk.back();
    expect([...desk.state.marks().values()].map(({ frame }) => frame)).toEqual([30]);
  });

  it('goes on where it was left, and tells each whole mark once it is placed or moved', () => {
    const desk = deskOf(round([true, false, false]));
    expect([desk.position(), desk.done()]).toEqual([1, 1]);
    const told: [number, object][] = [];
    desk.onMarked((position, marked) => told.push([position, marked]));
    place(desk);
    expect(told).toEqual([[1, joints]]);
    desk.state.marking.nudgeJoint(1, 0);
    expect(told.at(-1)).toEqual([1, { ...joints, wrist: { x: 761, y: 390 } }]);
    desk.next();
    place(desk);
    expect([desk.allDone(), desk.isLast()]).toEqual([true, true]);
  });

  it('leads back to the frame that is undone', () => {
    const desk = deskOf();
    place(desk);
    desk.next();
    desk.state.undo();
    expect([desk.position(), desk.complete()]).toEqual([0, false]);
  });

  it('leaves the Desk’s keys for frames, events and arms without effect', () => {
    const desk = deskOf();
    for (const command of ['step-forward', 'right-arm', 'set-entry', 'remove-mark', 'play'] as const)
      expect([command, desk.takes(command)]).toEqual([command, true]);
    expect(desk.takes('place-joint')).toBe(false);
    place(desk);
    expect(desk.takes('next-to-mark')).toBe(true);
    expect(desk.position()).toBe(1);
  });
});
