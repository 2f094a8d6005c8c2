import { describe, expect, it } from 'vitest';
import { sayCoordination } from './say-coordination';

describe('what both arms do together', () => {
  it('says mode, figure and how many passages', () => {
    const said = sayCoordination({ value: -0.0714, uncertainty: 0.0058, mode: 'catch-up', count: 2 });
    expect(said.headline).toBe('Catch-up: a gap between the pulls of the two arms');
    expect(said.detail).toContain('Index of coordination −7.1 % ± 0.6 % of the cycle, over 2 passages');
  });

  it('claims no mode that the events cannot carry', () => {
    const said = sayCoordination({ value: 0.011, uncertainty: 0.012, mode: 'undetermined', count: 1 });
    expect(said.headline).toContain('cannot be told apart');
    expect(said.detail).toContain('+1 % ± 1 % of the cycle, over 1 passage ');
  });

  it('says what is missing', () => {
    expect(sayCoordination(null).detail).toContain('a stroke of one arm, one of the other');
  });
});
