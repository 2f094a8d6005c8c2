import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import { describe, expect, it } from 'vitest';
import { ClipConnection } from './clip-connection';
import type { ToPage, ToWorker } from './protocol';

/** A worker whose answers are given by hand. */
class HandWorker {
  readonly sent: ToWorker[] = [];
  terminated = false;
  private readonly listeners: { type: string; listener: (event: unknown) => void }[] = [];

  postMessage(message: ToWorker): void {
    this.sent.push(message);
  }

  terminate(): void {
    this.terminated = true;
  }

  addEventListener(type: string, listener: (event: unknown) => void): void {
    this.listeners.push({ type, listener });
  }

  answer(data: ToPage): void {
    this.emit('message', { data });
  }

  emit(type: string, event: unknown): void {
    for (const one of this.listeners) if (one.type === type) one.listener(event);
  }
}

class Image {
  format: string | null = 'I420';
  close(): void {
    this.format = null;
  }
}

const picture = () => new Image() as unknown as VideoFrame;
const index = { timestampsUs: [0, 33333, 66667], keyFrames: [0] } as ClipIndex;

async function connected() {
  const worker = new HandWorker();
  const opening = ClipConnection.open(worker, { mediaUrl: '/m', budgetBytes: 1 });
  worker.answer({ kind: 'opened', id: 0, index });
  return { worker, clip: await opening };
}

describe('ClipConnection', () => {
  it('gives each answer to the request it belongs to', async () => {
    const { worker, clip } = await connected();
    const [first, second] = [clip.frame(1), clip.frame(2)];
    const image = picture();
    worker.answer({ kind: 'picture', id: 2, image });
    worker.answer({ kind: 'no-picture', id: 1, reason: 'aborted', message: 'overtaken' });
    expect(await second).toEqual({ ok: true, frame: 2, image });
    expect(await first).toEqual({ ok: false, frame: 1, reason: 'aborted', message: 'overtaken' });
  });

  it('refuses frames that do not exist at once', async () => {
    const { clip } = await connected();
    for (const n of [-1, 3, 0.5, Number.NaN]) expect(() => clip.frame(n)).toThrow(RangeError);
  });

  it('takes a request back when its signal says so', async () => {
    const { worker, clip } = await connected();
    const abort = new AbortController();
    void clip.frame(1, { signal: abort.signal });
    abort.abort();
    expect(worker.sent.at(-1)).toEqual({ kind: 'cancel', id: 1 });
    expect(await clip.frame(1, { signal: abort.signal })).toMatchObject({ reason: 'aborted' });
  });

  it('counts lent pictures until they are closed, and closes what nobody waits for', async () => {
    const { worker, clip } = await connected();
    const image = picture();
    const asked = clip.frame(0);
    worker.answer({ kind: 'picture', id: 1, image });
    await asked;
    const stray = picture();
    worker.answer({ kind: 'picture', id: 99, image: stray });
    expect(stray.format).toBeNull();
    const statsOf = async (id: number) => {
      const asking = clip.stats();
      const empty = { cachedFrames: 0, cachedBytes: 0, budgetBytes: 1, openInWorker: 0, overtaken: 0 };
      const stats = { ...empty, bytesFetched: 0, packetsDecoded: 0, packetsSkipped: 0 };
      worker.answer({ kind: 'stats', id, stats });
      return (await asking).lentFrames;
    };
    expect(await statsOf(2)).toBe(1);
    image.close();
    expect(await statsOf(3)).toBe(0);
  });

  it('answers everything that waits when the worker dies or the clip is closed', async () => {
    const broken = await connected();
    const lost = broken.clip.frame(1);
    broken.worker.emit('error', {});
    expect(await lost).toMatchObject({ ok: false, reason: 'decoder-gave-up' });
    expect(await broken.clip.frame(1)).toMatchObject({ reason: 'decoder-gave-up' });

    const { worker, clip } = await connected();
    const waiting = clip.frame(1);
    const closing = clip.close();
    worker.answer({ kind: 'closed', id: 2 });
    await closing;
    expect(await waiting).toMatchObject({ reason: 'aborted' });
    expect(worker.terminated).toBe(true);
  });

  it('throws the refusal of a clip with its code', async () => {
    const worker = new HandWorker();
    const opening = ClipConnection.open(worker, { mediaUrl: '/m', budgetBytes: 1 });
    worker.answer({ kind: 'refused', id: 0, code: 'network', message: 'gone' });
    await expect(opening).rejects.toMatchObject({ code: 'network', message: 'gone' });
    expect(worker.terminated).toBe(true);
  });
});
