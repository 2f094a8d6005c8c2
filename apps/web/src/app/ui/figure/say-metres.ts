import { fixed } from './format-figure';

/** `1.23 m ± 0.02 m`: as many decimals as the standard uncertainty carries, at least centimetres below a metre of it. */
export function sayMetres(metres: number, uncertaintyM: number): string {
  const places = placesFor(uncertaintyM);
  const least = 10 ** -places;
  return `${fixed(metres, places)} m ± ${fixed(Math.max(uncertaintyM, least), places)} m`;
}

/** A difference: `2 cm`, `0.4 m`. */
export function sayShortLength(metres: number): string {
  const amount = Math.abs(metres);
  return amount < 0.095 ? `${fixed(100 * amount, 1)} cm` : `${fixed(amount, 2)} m`;
}

function placesFor(uncertaintyM: number): number {
  if (!(uncertaintyM < 0.95)) return 0;
  if (uncertaintyM >= 0.095) return 1;
  return uncertaintyM >= 0.0095 ? 2 : 3;
}
