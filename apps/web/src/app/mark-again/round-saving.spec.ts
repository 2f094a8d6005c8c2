import type { Joints } from '@stillstroke/contract/repeatability';
import { RoundSaving } from './round-saving';

const at = (x: number): Joints => ({ shoulder: { x, y: 0 }, elbow: { x, y: 50 }, wrist: { x, y: 90 } });

describe('saving marks of a round', () => {
  it('sends them one after the other, the newest of each frame last', async () => {
    const sent: [number, number][] = [];
    let let1: () => void = () => undefined;
    const held = new Promise<void>((resolve) => (let1 = resolve));
    const saving = new RoundSaving(
      async (position, { shoulder }) => {
        if (sent.length === 0) await held;
        sent.push([position, shoulder.x]);
      },
      () => '',
    );
    saving.add(0, at(1));
    saving.add(0, at(2));
    saving.add(1, at(3));
    expect([saving.saved(), saving.words()]).toEqual([false, 'Saving …']);
    let1();
    await vi.waitFor(() => expect(saving.saved()).toBe(true));
    expect(sent).toEqual([
      [0, 1],
      [0, 2],
      [1, 3],
    ]);
    expect(saving.words()).toBe('Saved');
  });

  it('keeps what was refused, says why, and sends it again', async () => {
    let down = true;
    const sent: number[] = [];
    const saving = new RoundSaving(
      (position) => {
        if (down) return Promise.reject(new Error('no network'));
        sent.push(position);
        return Promise.resolve();
      },
      (error) => (error as Error).message,
    );
    saving.add(4, at(1));
    await vi.waitFor(() => expect(saving.problem()).toBe('no network'));
    expect([saving.saved(), saving.words()]).toEqual([false, 'Not saved']);
    down = false;
    await saving.run();
    expect([sent, saving.saved(), saving.problem()]).toEqual([[4], true, null]);
  });
});
