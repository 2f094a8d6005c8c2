import { describe, expect, it } from 'vitest';
import type { DeskStroke, EventName } from './desk-stroke';
import { eventOfStroke, eventOnFrame } from './set-event';

const first: DeskStroke = {
  id: 'a',
  arm: 'left',
  entry: 10,
  catch: 30,
  exit: 60,
  nextEntry: 80,
  breath: false,
};
const second: DeskStroke = {
  id: 'b',
  arm: 'left',
  entry: 80,
  catch: 100,
  exit: 130,
  nextEntry: null,
  breath: false,
};

function press(strokes: readonly DeskStroke[], event: EventName, frame: number) {
  const found = eventOnFrame(strokes, { arm: 'left', event, frame, newId: 'new' });
  return found.ok ? found.value.map(({ after }) => [after.id, after.entry, after.nextEntry]) : found.reason;
}

describe('an event key on a frame', () => {
  it('begins the first stroke with its entry', () => {
    expect(press([], 'entry', 5)).toEqual([['new', 5, null]]);
    expect(press([first], 'entry', 5)).toEqual([['new', 5, null]]);
  });

  it('corrects the entry as long as the catch is ahead', () => {
    expect(press([first], 'entry', 12)).toEqual([['a', 12, 80]]);
    expect(press([{ ...first, catch: null, exit: null, nextEntry: null }], 'entry', 40)).toEqual([
      ['a', 40, null],
    ]);
  });

  it('does not begin a stroke within the pull of another', () => {
    expect(press([first], 'entry', 45)).toContain('Set its exit first');
  });

  it('ends the stroke before with the entry of the next', () => {
    expect(press([first, { ...second, nextEntry: null }], 'entry', 150)).toEqual([
      ['b', 80, 150],
      ['new', 150, null],
    ]);
    expect(press([first], 'entry', 80)).toEqual([['new', 80, null]]);
    expect(press([first], 'entry', 75)).toEqual([
      ['a', 10, 75],
      ['new', 75, null],
    ]);
  });

  it('moves a next entry and the entry on the same frame together, from either side', () => {
    const both = [
      ['b', 78, null],
      ['a', 10, 78],
    ];
    expect(press([first, second], 'entry', 78)).toEqual(both);
    expect(press([first, second], 'nextEntry', 78)).toEqual([...both].reverse());
  });

  it('names the two events that are out of order', () => {
    expect(press([first], 'exit', 20)).toBe(
      'The exit has to come after the catch: catch on frame 30, exit on frame 20.',
    );
    expect(press([first], 'catch', 70)).toContain('exit has to come after the catch');
    expect(press([first], 'catch', 85)).toContain('Set its entry first');
    expect(press([{ ...first, exit: null, nextEntry: null }], 'nextEntry', 90)).toContain('Set the exit');
  });

  it('lets no two strokes of an arm lie over each other, while the other arm does not matter', () => {
    const apart = { ...second, entry: 90 };
    const found = eventOfStroke([first, apart], first, 'nextEntry', 95);
    expect(found).toMatchObject({ ok: false });
    const other = { ...apart, arm: 'right' as const };
    expect(eventOfStroke([first, other], first, 'nextEntry', 95)).toMatchObject({ ok: true });
  });

  it('takes away a next entry, but no other event', () => {
    expect(eventOfStroke([first], first, 'nextEntry', null)).toMatchObject({ ok: true });
    expect(eventOfStroke([first], first, 'catch', null)).toMatchObject({ ok: false });
  });
});
