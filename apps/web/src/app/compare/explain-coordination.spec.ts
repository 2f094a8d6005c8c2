import type { Coordination } from '@stillstroke/contract/coordination';
import { explainCoordination } from './explain-coordination';

const passage = (frame: number, value: number, uncertainty: number): Coordination['passages'][number] => ({
  clipId: 'clip-1',
  strokeId: `stroke-${frame}`,
  breath: frame === 90,
  value,
  uncertainty,
  frame,
});

describe('the index of coordination, opened up', () => {
  const said: Coordination = {
    value: -0.06,
    uncertainty: 0.025,
    interval: { low: -0.109, high: -0.011 },
    mode: 'catch-up',
    passages: [passage(30, -0.08, 0.03), passage(90, -0.04, 0.04)],
  };

  it('names each passage’s part in the mean, largest first', () => {
    const shown = explainCoordination(said);
    expect(shown?.parts.map(({ name }) => name)).toEqual([
      'choosing the events of the passage from frame 90',
      'choosing the events of the passage from frame 30',
    ]);
    // u/n of each: 2 and 1.5 points, of which the whole is √(2² + 1.5²) = 2.5.
    expect(shown?.parts.map(({ alone }) => alone)).toEqual(['± 2.0 points', '± 1.5 points']);
    expect(shown?.parts.map(({ share }) => share)).toEqual([16 / 25, 9 / 25]);
    expect(shown?.result).toContain('catch-up');
    expect(shown?.frames.map(({ frame }) => frame)).toEqual([30, 90]);
    expect(shown?.inputs[1]?.name).toContain('with a breath');
  });

  it('is not there without passages', () => {
    const none = { value: null, uncertainty: null, interval: null, mode: null, passages: [] };
    expect(explainCoordination(none)).toBeNull();
  });
});
