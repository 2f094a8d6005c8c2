import type { Finding } from '@stillstroke/contract/reviews';
import { DraftEdits, type EditResult } from './draft-edits';
import { DeviceDraftStore, type DraftStore, type PendingEdit } from './draft-store';
import { sayDraftState } from './say-draft-state';

const finding = (more: Partial<Finding> = {}): Finding => ({
  id: 'f',
  reviewId: 'r',
  kind: 'to-work-on',
  words: '',
  arm: 'none',
  phase: 'whole',
  observation: null,
  mainFocus: false,
  readings: [],
  stills: [],
  questions: [],
  version: 1,
  updatedBy: null,
  updatedAt: '2026-11-28T10:00:00.000Z',
  ...more,
});

/** A server of one finding that checks versions as the real one does. */
class OneFinding {
  now = finding();
  reachable = true;
  readonly got: PendingEdit[] = [];
  private waiting: (() => void)[] = [];
  slow = false;

  readonly send = async (edit: PendingEdit): Promise<EditResult> => {
    this.got.push(edit);
    if (this.slow) await new Promise<void>((go) => this.waiting.push(go));
    if (!this.reachable) return { kind: 'later' };
    if (edit.version !== this.now.version) return { kind: 'conflict', finding: this.now };
    this.now = {
      ...this.now,
      ...(edit.after as Pick<Finding, 'words' | 'arm'>),
      version: this.now.version + 1,
    };
    return { kind: 'done', finding: this.now };
  };

  byOther(more: Partial<Finding>): void {
    this.now = { ...this.now, ...more, version: this.now.version + 1, updatedBy: 'Petra Lund' };
  }

  answer(): void {
    for (const go of this.waiting.splice(0)) go();
  }
}

let names = 0;
const freshStore = () => new DeviceDraftStore(`review-edits-${(names += 1)}-${crypto.randomUUID()}`);

function tab(server: OneFinding, store: DraftStore) {
  const timers: { ms: number; callback: () => void }[] = [];
  let known = server.now;
  const edits = new DraftEdits({
    owner: 'u:r',
    store,
    send: server.send,
    saved: (saved) => (known = saved),
    online: () => server.reachable,
    later: (ms, callback) => {
      const timer = { ms, callback };
      timers.push(timer);
      return () => timers.splice(timers.indexOf(timer), 1);
    },
    newId: () => crypto.randomUUID(),
    now: () => (names += 1),
  });
  return {
    edits,
    type: (words: string) => edits.edit(known, { words }),
    choose: (arm: Finding['arm']) => edits.edit(known, { arm }),
    /** The pause after the last key is over. */
    pause: async () => {
      for (const { callback } of timers.splice(0)) callback();
      await edits.flush();
    },
    timers,
    known: () => known,
  };
}

describe('a draft that is typed', () => {
  it('is sent after a pause, once, with its newest text', async () => {
    const server = new OneFinding();
    const one = tab(server, freshStore());
    one.type('The r');
    one.type('The right hand');
    expect(one.edits.state().kind).toBe('saving');
    expect(server.got).toEqual([]);
    await one.pause();
    expect(server.got.map(({ after, version }) => [after, version])).toEqual([
      [{ words: 'The right hand' }, 1],
    ]);
    expect(one.edits.state()).toEqual({ kind: 'saved' });
    one.type('x');
    one.type('The right hand');
    await one.pause();
    expect(server.got).toHaveLength(1);
  });

  it('keeps what is typed while a change is under way', async () => {
    const server = new OneFinding();
    server.slow = true;
    const one = tab(server, freshStore());
    one.type('The right');
    for (const { callback } of one.timers.splice(0)) callback();
    one.type('The right hand slips');
    expect(one.edits.pendingOf('f')).toEqual({ words: 'The right hand slips' });
    server.slow = false;
    server.answer();
    await vi.waitFor(() => expect(server.got).toHaveLength(1));
    await one.pause();
    expect(server.now).toMatchObject({ words: 'The right hand slips', version: 3 });
    expect(one.edits.state()).toEqual({ kind: 'saved' });
  });

  it('stays on the device while the server cannot be reached, also over a reload', async () => {
    const server = new OneFinding();
    server.reachable = false;
    const store = freshStore();
    const one = tab(server, store);
    one.type('Typed at the pool');
    await one.pause();
    expect(sayDraftState(one.edits.state())).toBe('No connection. Your text is kept on this device.');
    one.edits.close();
    server.reachable = true;
    const again = tab(server, store);
    await again.edits.recover();
    await again.pause();
    expect(server.now.words).toBe('Typed at the pool');
    await vi.waitFor(async () => expect(await store.list('u:r')).toEqual([]));
  });

  it('says so where nothing can be kept', async () => {
    const broken: DraftStore = {
      list: () => Promise.reject(new Error('no storage')),
      put: () => Promise.reject(new Error('no storage')),
      remove: () => Promise.reject(new Error('no storage')),
    };
    const server = new OneFinding();
    server.reachable = false;
    const one = tab(server, broken);
    await one.edits.recover();
    one.type('x');
    await one.pause();
    expect(sayDraftState(one.edits.state(), one.edits.kept())).toContain('leave this page open');
  });
});

describe('two people in one finding', () => {
  it('are put together where they changed different things', async () => {
    const server = new OneFinding();
    const one = tab(server, freshStore());
    server.byOther({ arm: 'right' });
    one.type('Late');
    await one.pause();
    expect(server.now).toMatchObject({ words: 'Late', arm: 'right' });
    expect(one.known().arm).toBe('right');
    expect(one.edits.held()).toEqual([]);
  });

  it('decide where both changed the same: nothing is overwritten unseen', async () => {
    const server = new OneFinding();
    const one = tab(server, freshStore());
    one.type('Mine');
    one.choose('left');
    server.byOther({ words: 'Theirs' });
    await one.pause();
    expect(server.now.words).toBe('Theirs');
    expect(one.edits.held()).toMatchObject([
      { fields: ['words'], theirs: { words: 'Theirs' }, words: 'Petra Lund changed this finding meanwhile.' },
    ]);
    expect(one.edits.pendingOf('f')).toEqual({ words: 'Mine', arm: 'left' });
    one.edits.keepMine('f');
    await one.edits.flush();
    expect(server.now).toMatchObject({ words: 'Mine', arm: 'left' });

    one.type('Mine again');
    server.byOther({ words: 'Theirs again' });
    await one.pause();
    one.edits.giveUp('f');
    expect(one.known().words).toBe('Theirs again');
    expect(one.edits.state()).toEqual({ kind: 'saved' });
  });
});

describe('one draft in two tabs', () => {
  it('of which both lost the connection: neither text is lost', async () => {
    const server = new OneFinding();
    server.reachable = false;
    const store = freshStore();
    const [one, two] = [tab(server, store), tab(server, store)];
    one.type('From the first tab');
    await one.pause();
    two.type('From the second tab');
    await two.pause();
    one.edits.close();
    two.edits.close();
    server.reachable = true;
    const again = tab(server, store);
    await again.edits.recover();
    await again.pause();
    expect(server.now.words).toBe('From the second tab');
    const spare = again.edits.spare()[0];
    expect(spare?.after).toEqual({ words: 'From the first tab' });
    if (spare) again.edits.settleSpare(spare, again.known());
    await again.pause();
    expect(server.now.words).toBe('From the first tab');
    await vi.waitFor(async () => expect(await store.list('u:r')).toEqual([]));
  });
});
