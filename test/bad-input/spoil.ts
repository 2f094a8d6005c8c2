/** Every way to spoil one place of the input of a function: numbers that are none, lists that are empty or short, joints missing. */

const badNumbers = [NaN, Infinity, -Infinity, 1e12, -1e12, -1, 0];

export interface Spoilt {
  /** What was done, e.g. `1.0.wrist.x = NaN`. */
  readonly what: string;
  readonly input: readonly unknown[];
}

/** Copies of a function's input, each with one place of one argument spoilt. Of long lists only the ends are. */
export function* spoilt(input: readonly unknown[]): Generator<Spoilt> {
  for (const [n, argument] of input.entries())
    for (const [what, place, value] of places(argument, String(n)))
      yield { what: `${what} = ${String(value)}`, input: input.with(n, withPlace(argument, place, value)) };
}

type Place = readonly (string | number)[];

function* places(value: unknown, path: string, at: Place = []): Generator<[string, Place, unknown]> {
  if (typeof value === 'number') {
    for (const bad of badNumbers) yield [path, at, bad];
  } else if (Array.isArray(value)) {
    yield [path, at, []];
    if (value.length > 1) yield [path, at, value.slice(0, 1)];
    const items = value as readonly unknown[];
    // All the same: no spread, no length, no time between.
    if (items.length > 1) yield [path, at, items.map(() => items[0])];
    const some = items.length > 30 ? [0, items.length - 1] : items.map((_, n) => n);
    for (const n of some) yield* places(items[n], `${path}.${n}`, [...at, n]);
  } else if (typeof value === 'object' && value !== null) {
    const fields = value as Readonly<Record<string, unknown>>;
    for (const [name, field] of Object.entries(fields)) {
      if (isPoint(field)) {
        yield [`${path}.${name}`, [...at, name], undefined];
        for (const [other, point] of Object.entries(fields))
          if (other !== name && isPoint(point)) yield [`${path}.${name}`, [...at, name], point];
      }
      yield* places(field, `${path}.${name}`, [...at, name]);
    }
  }
}

function isPoint(value: unknown): boolean {
  return typeof value === 'object' && value !== null && 'x' in value && 'y' in value;
}

function withPlace(value: unknown, place: Place, put: unknown): unknown {
  const [first, ...rest] = place;
  if (first === undefined) return put;
  if (Array.isArray(value))
    return value.map((item: unknown, n) => (n === first ? withPlace(item, rest, put) : item));
  const fields = value as Readonly<Record<string, unknown>>;
  return { ...fields, [first]: withPlace(fields[first], rest, put) };
}

/** Paths of numbers in an answer that are NaN. */
export function notANumber(value: unknown, path = ''): string[] {
  if (typeof value === 'number') return Number.isNaN(value) ? [path || 'itself'] : [];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([name, one]) => notANumber(one, `${path}.${name}`));
}
