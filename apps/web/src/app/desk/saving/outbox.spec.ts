import { afterEach, describe, expect, it } from 'vitest';
import type { DeskChange } from '../state/desk-change';
import type { DeskMark } from '../state/desk-mark';
import type { DeskStroke } from '../state/desk-stroke';
import { markWith } from '../state/testing';
import { Outbox } from './outbox';
import type { PendingChange } from './pending-change';
import { DevicePendingStore } from './pending-store';
import type { SendResult } from './send-change';

/** A server that answers when the test says so, and a clock that the test turns. */
class Line {
  readonly asked: { readonly change: PendingChange; readonly answer: (result: SendResult) => void }[] = [];
  readonly waits: { readonly ms: number; readonly callback: () => void }[] = [];
  isOnline = true;
  private made = 0;

  constructor(readonly store: DevicePendingStore) {}

  box(owner = 'coach:clip'): Outbox {
    return new Outbox({
      owner,
      store: this.store,
      send: (change) => new Promise((answer) => this.asked.push({ change, answer })),
      online: () => this.isOnline,
      later: (ms, callback) => {
        const wait = { ms, callback };
        this.waits.push(wait);
        return () => this.waits.splice(this.waits.indexOf(wait), 1);
      },
      newId: () => `change-${(this.made += 1)}-${crypto.randomUUID()}`,
    });
  }

  /** Waits for the nth request (0-based) and answers it. */
  async answer(at: number, result: SendResult): Promise<PendingChange> {
    await until(() => this.asked.length > at);
    const request = this.asked[at];
    if (!request) throw new Error('no such request');
    request.answer(result);
    await settle();
    return request.change;
  }
}

async function settle(): Promise<void> {
  for (let i = 0; i < 5; i += 1) await new Promise((resolve) => setTimeout(resolve, 0));
}

async function until(met: () => boolean): Promise<void> {
  for (let i = 0; i < 400 && !met(); i += 1) await new Promise((resolve) => setTimeout(resolve, 5));
  if (!met()) throw new Error('it did not come about');
}

let stores = 0;
function freshLine(): Line {
  stores += 1;
  return new Line(new DevicePendingStore(`outbox-test-${stores}-${crypto.randomUUID()}`));
}

const mark = (frame: number, forearmDeg = 40): DeskMark =>
  markWith('left', frame, { upperArmDeg: 60, forearmDeg });
const put = (before: DeskMark | null, after: DeskMark | null): DeskChange => {
  const frame = (after ?? before)?.frame ?? 0;
  return { kind: 'mark', arm: 'left', frame, before, after };
};
const strokeA: DeskStroke = {
  id: 'a',
  arm: 'left',
  entry: 0,
  catch: 10,
  exit: 30,
  nextEntry: 50,
  breath: false,
};
const strokeB: DeskStroke = { ...strokeA, id: 'b', entry: 50, catch: 60, exit: 80, nextEntry: null };
const move = (before: DeskStroke | null, after: DeskStroke | null): DeskChange => ({
  kind: 'stroke',
  id: (after ?? before)?.id ?? '',
  before,
  after,
});
const done = (version: number): SendResult => ({ kind: 'done', version });

describe('Outbox', () => {
  const open: Outbox[] = [];
  const keep = (box: Outbox): Outbox => {
    open.push(box);
    return box;
  };
  afterEach(() => open.splice(0).forEach((box) => box.close()));

  it('has a change on the device before it sends it, and forgets it when it is acknowledged', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.add([put(null, mark(7))]);
    expect(box.state()).toEqual({ kind: 'saving', count: 1 });
    await until(() => line.asked.length === 1);
    expect(await line.store.list('coach:clip')).toMatchObject([
      { thing: 'mark:left:7', base: 0, tried: true },
    ]);
    await line.answer(0, done(1));
    expect(box.state()).toEqual({ kind: 'saved', drafts: 0 });
    expect(await line.store.list('coach:clip')).toEqual([]);
  });

  it('sends one at a time, makes waiting changes of a mark one, and builds on the version answered', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.add([put(null, mark(7, 10))]);
    await until(() => line.asked.length === 1);
    box.add([put(mark(7, 10), mark(7, 20))]);
    box.add([put(mark(7, 20), mark(7, 30))]);
    box.add([put(null, mark(9))]);
    await settle();
    expect(line.asked).toHaveLength(1);
    await line.answer(0, done(1));
    const second = await line.answer(1, done(2));
    expect(second).toMatchObject({ base: 1, wanted: { mark: mark(7, 30) } });
    expect(await line.answer(2, done(1))).toMatchObject({ thing: 'mark:left:9', base: 0 });
    expect(box.state().kind).toBe('saved');
  });

  it('keeps the order of stroke changes that depend on each other', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.knows(
      new Map([
        ['stroke:a', 3],
        ['stroke:b', 5],
      ]),
    );
    box.add([put(null, mark(1))]);
    const b60 = { ...strokeB, entry: 56 };
    const a40 = { ...strokeA, nextEntry: 40 };
    box.add([move(strokeB, b60)]);
    box.add([move(strokeA, a40)]);
    box.add([move(b60, { ...strokeB, entry: 40 })]);
    const order = ['mark:left:1', 'stroke:b', 'stroke:a', 'stroke:b'];
    for (const [at, thing] of order.entries()) {
      expect((await line.answer(at, done(10 + at))).thing).toBe(thing);
    }
    expect(line.asked[3]?.change.base).toBe(11);
  });

  it('says nothing to the server of what was made and unmade, nor of what is unfinished', async () => {
    const line = freshLine();
    line.isOnline = false;
    const box = keep(line.box());
    const half: DeskMark = { ...mark(3), wrist: null };
    box.add([put(null, half)]);
    await settle();
    expect(line.asked).toHaveLength(0);
    expect(box.state()).toEqual({ kind: 'saved', drafts: 1 });
    await until(() => true);
    box.add([put(half, null)]);
    expect(box.state()).toEqual({ kind: 'saved', drafts: 0 });
    await settle();
    expect(await line.store.list('coach:clip')).toEqual([]);
  });

  it('takes a mark that became unfinished off the server and keeps the rest of it here', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.knows(new Map([['mark:left:3', 4]]));
    const half: DeskMark = { ...mark(3), wrist: null };
    box.add([put(mark(3), half)]);
    expect(await line.answer(0, done(0))).toMatchObject({ base: 4, wanted: { mark: half } });
    expect(box.state()).toEqual({ kind: 'saved', drafts: 1 });
    box.add([put(half, mark(3))]);
    expect(await line.answer(1, done(1))).toMatchObject({ base: 0, wanted: { mark: mark(3) } });
  });

  it('loses nothing without a connection: waits longer each time, sends again when the network is back', async () => {
    const line = freshLine();
    line.isOnline = false;
    const box = keep(line.box());
    box.add([put(null, mark(7))]);
    await line.answer(0, { kind: 'later' });
    box.add([put(null, mark(8))]);
    expect(box.state()).toEqual({ kind: 'waiting', count: 2, offline: true });
    expect(line.waits.map(({ ms }) => ms)).toEqual([1000]);
    line.waits.splice(0).forEach(({ callback }) => callback());
    await line.answer(1, { kind: 'later' });
    expect(line.waits.map(({ ms }) => ms)).toEqual([2000]);
    line.isOnline = true;
    box.retryNow();
    expect(line.waits).toEqual([]);
    await line.answer(2, done(1));
    await line.answer(3, done(1));
    expect(box.state().kind).toBe('saved');
  });

  it('goes on after a crash from what the device kept, on the versions it was made on', async () => {
    const line = freshLine();
    const before = keep(line.box());
    before.knows(new Map([['mark:left:7', 2]]));
    before.add([put(mark(7, 10), mark(7, 20))]);
    await until(() => line.asked.length === 1);
    before.close();

    const after = keep(line.box());
    after.knows(new Map([['mark:left:7', 3]]));
    expect(await after.recover()).toMatchObject([{ thing: 'mark:left:7', base: 2, tried: true }]);
    // The lost answer might have been an acknowledgement, so the next change is not folded into it.
    after.add([put(mark(7, 20), mark(7, 30))]);
    after.start();
    expect(await line.answer(1, done(3))).toMatchObject({ base: 2, wanted: { mark: mark(7, 20) } });
    expect(await line.answer(2, done(4))).toMatchObject({ base: 3, wanted: { mark: mark(7, 30) } });
    expect(await keep(line.box('another:clip')).recover()).toEqual([]);
  });

  it('holds a conflict back until the coach decides, and sends other things meanwhile', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.knows(new Map([['mark:left:7', 1]]));
    box.add([put(mark(7, 10), mark(7, 20)), put(null, mark(9))]);
    const theirs = {
      wanted: { kind: 'mark', arm: 'left', frame: 7, mark: mark(7, 55) },
      version: 6,
    } as const;
    await line.answer(0, { kind: 'conflict', theirs });
    await line.answer(1, done(1));
    expect(box.state()).toEqual({ kind: 'conflict', count: 1 });
    expect(box.held()).toMatchObject([{ change: { wanted: { mark: mark(7, 20) } }, theirs: { version: 6 } }]);

    box.add([put(mark(7, 20), mark(7, 21))]);
    await settle();
    expect(line.asked).toHaveLength(2);
    box.keepMine('mark:left:7');
    expect(await line.answer(2, done(7))).toMatchObject({ base: 6, wanted: { mark: mark(7, 21) } });
    expect(box.state().kind).toBe('saved');
  });

  it('gives the own change up for theirs', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.add([put(null, mark(7))]);
    const theirs = { wanted: { kind: 'mark', arm: 'left', frame: 7, mark: null }, version: 0 } as const;
    await line.answer(0, { kind: 'conflict', theirs });
    box.giveUp('mark:left:7', 0);
    expect(box.state().kind).toBe('saved');
    await settle();
    expect(await line.store.list('coach:clip')).toEqual([]);
  });

  it('tries a refused stroke again when a stroke is corrected', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.add([move(null, strokeB)]);
    await line.answer(0, { kind: 'refused', words: 'Another stroke is there.' });
    expect(box.state()).toEqual({ kind: 'refused', count: 1, words: 'Another stroke is there.' });
    box.add([move(strokeB, { ...strokeB, entry: 52 })]);
    expect(await line.answer(1, done(1))).toMatchObject({ base: 0, wanted: { stroke: { entry: 52 } } });
    expect(box.state().kind).toBe('saved');
  });

  it('stops when the sign-in has ended, and keeps everything', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.add([put(null, mark(7)), put(null, mark(8))]);
    await line.answer(0, { kind: 'stopped', why: 'signed-out' });
    expect(box.state()).toEqual({ kind: 'stopped', count: 2, why: 'signed-out' });
    await settle();
    expect(line.asked).toHaveLength(1);
    expect(await line.store.list('coach:clip')).toHaveLength(2);
  });

  it('goes on after a right was given back, when the person asks for it', async () => {
    const line = freshLine();
    const box = keep(line.box());
    box.add([put(null, mark(7))]);
    await line.answer(0, { kind: 'stopped', why: 'forbidden' });
    box.retryNow();
    await line.answer(1, done(1));
    expect(box.state().kind).toBe('saved');
  });

  it('says so when the device keeps nothing, and still sends', async () => {
    const line = freshLine();
    line.store.put = () => Promise.reject(new Error('quota'));
    const box = keep(line.box());
    box.add([put(null, mark(7))]);
    await line.answer(0, done(1));
    expect(box.kept()).toBe(false);
    expect(box.state().kind).toBe('saved');
  });
});
