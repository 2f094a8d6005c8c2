import { describe, expect, it } from 'vitest';
import {
  formatDifference,
  formatFigure,
  formatInterval,
  formatRange,
  formatUncertainty,
} from './format-figure';

describe('figures on the screen', () => {
  it('shows as many digits as the uncertainty carries', () => {
    expect(formatFigure(46.27, 'deg', 1.8)).toBe('46°');
    expect(formatFigure(46.27, 'deg', 0.4)).toBe('46.3°');
    expect(formatFigure(0.5812, 'share', 0.04)).toBe('58 %');
    expect(formatUncertainty(1.8, 'deg')).toBe('± 2°');
    expect(formatUncertainty(0.4, 'deg')).toBe('± 0.4°');
  });

  it('never shows an uncertainty of nothing', () => {
    expect(formatUncertainty(0, 'deg')).toBe('± 0.1°');
    expect(formatUncertainty(0.0001, 'share')).toBe('± 0.1 %');
  });

  it('shows metres to the hundredth where the uncertainty carries it', () => {
    expect(formatFigure(1.9312, 'm', 0.033)).toBe('1.93 m');
    expect(formatUncertainty(0.033, 'm')).toBe('± 0.03 m');
    expect(formatFigure(1.9312, 'm', 0.2)).toBe('1.9 m');
    expect(formatUncertainty(0.002, 'm2PerS')).toBe('± 0.01 m²/s');
    expect(formatFigure(1.42, 'mPerS', 0.016)).toBe('1.42 m/s');
    expect(formatFigure(1.9312, 'm')).toBe('1.93 m');
    expect(formatDifference(-0.05, 'm')).toBe('0.05 m');
    expect(formatInterval({ low: -0.02, high: 0.11 }, 'm')).toBe('−0.02 to 0.11');
    // Degrees and percent never get more than tenths.
    expect(formatFigure(46.27, 'deg', 0.04)).toBe('46.3°');
  });

  it('writes signs where they mean something, and a true minus', () => {
    expect(formatFigure(6.2, 'deg', 1, true)).toBe('+6°');
    expect(formatFigure(-6.2, 'deg', 1, true)).toBe('−6°');
    expect(formatFigure(-0.2, 'deg', 1, true)).toBe('0°');
  });

  it('says differences in points and degrees', () => {
    expect(formatDifference(0.24, 'share')).toBe('24 points');
    expect(formatDifference(-0.01, 'share')).toBe('1 point');
    expect(formatDifference(-15.4, 'deg')).toBe('15°');
    expect(formatInterval({ low: -0.31, high: -0.17 }, 'share')).toBe('17 to 31');
    expect(formatInterval({ low: -4.2, high: 6 }, 'deg')).toBe('−4 to 6');
  });

  it('keeps the signs of a range', () => {
    expect(formatRange({ low: -5.8, high: -3.1 }, 'deg')).toBe('−5.8 to −3.1°');
    expect(formatRange({ low: 0.519, high: 0.641 }, 'share')).toBe('52 to 64 %');
    expect(formatRange({ low: -0.16, high: -0.05 }, 'share', 'difference')).toBe('−16 to −5 points');
  });
});
