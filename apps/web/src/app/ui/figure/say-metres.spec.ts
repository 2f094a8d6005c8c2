import { expect, it } from 'vitest';
import { sayMetres, sayShortLength } from './say-metres';

it.each([
  [1.2345, 0.021, '1.23 m ± 0.02 m'],
  [1.2345, 0.0021, '1.234 m ± 0.002 m'],
  [12.34, 0.21, '12.3 m ± 0.2 m'],
  [12.34, 2.1, '12 m ± 2 m'],
  [0.5, 0, '0.500 m ± 0.001 m'],
  [-0.2, 0.01, '−0.20 m ± 0.01 m'],
])('%f m, u = %f m: %s', (metres, u, words) => {
  expect(sayMetres(metres, u)).toBe(words);
});

it('says small lengths in centimetres', () => {
  expect(sayShortLength(-0.021)).toBe('2.1 cm');
  expect(sayShortLength(0.4)).toBe('0.40 m');
});
