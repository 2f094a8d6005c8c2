import { sayDate, todayHere } from './say-date';

describe('sayDate', () => {
  it('leaves the year out when it is this one', () => {
    expect(sayDate('2026-11-28', '2026-12-01')).toBe('28 Nov');
    expect(sayDate('2025-07-04', '2026-12-01')).toBe('4 Jul 2025');
  });
});

describe('todayHere', () => {
  it('is the date on the wall, not the one in Greenwich', () => {
    expect(todayHere(new Date(2026, 0, 5, 23, 59))).toBe('2026-01-05');
    expect(todayHere(new Date(2026, 0, 5, 0, 1))).toBe('2026-01-05');
  });
});
