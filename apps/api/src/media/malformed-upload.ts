import { readFileSync } from 'node:fs';
import { corpusFile, corpusFiles } from './test-films';

/** A body and its content type, as somebody who means harm or has a broken client would send it. */
export interface MalformedUpload {
  readonly kind: string;
  readonly contentType: string;
  readonly body: Buffer;
}

/** Whole numbers from 0 to below a bound, the same for the same seed (mulberry32, from memory). */
export function dice(seed: number): (below: number) => number {
  let state = seed >>> 0;
  return (below) => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) % below;
  };
}

type Roll = ReturnType<typeof dice>;

const rope = 'multipart/form-data; boundary=rope';
const films = [...corpusFiles(), ...corpusFiles('refused')];

const part = (head: string, content: Buffer | string) =>
  Buffer.concat([
    Buffer.from(`--rope\r\n${head}\r\n\r\n`),
    Buffer.from(content as string),
    Buffer.from('\r\n'),
  ]);
const filePart = (content: Buffer, name = 'a.mp4') =>
  part(`Content-Disposition: form-data; name="video"; filename="${name}"`, content);
const fieldPart = (name: string, value: string) =>
  part(`Content-Disposition: form-data; name="${name}"`, value);
const whole = (...parts: Buffer[]) => Buffer.concat([...parts, Buffer.from('--rope--\r\n')]);

const noise = (roll: Roll, length: number) => Buffer.from(Array.from({ length }, () => roll(256)));
const film = (roll: Roll) => readFileSync(corpusFile(films[roll(films.length)] ?? 'b-frames.mp4'));

const names = [
  '../../../etc/passwd',
  '..\\..\\windows.mp4',
  'a\0b.mp4',
  '/',
  '.',
  '..',
  'x'.repeat(5000),
  '‮4pm.exe',
  '\r\nX-Injected: 1',
  '%00',
  '',
  '"',
  '😀'.repeat(300),
];

type Maker = (roll: Roll) => { body: Buffer; contentType?: string };

const makers: Record<string, Maker> = {
  'random bytes': (roll) => ({ body: noise(roll, roll(4000)) }),
  'random bytes as the film': (roll) => ({ body: whole(filePart(noise(roll, roll(4000)))) }),
  'a cut upload': (roll) => {
    const body = whole(fieldPart('view', 'deck'), filePart(film(roll)));
    return { body: body.subarray(0, roll(body.length)) };
  },
  'a changed film': (roll) => {
    const bytes = film(roll);
    for (let n = 1 + roll(40); n > 0 && bytes.length > 0; n -= 1) bytes[roll(bytes.length)] = roll(256);
    return { body: whole(filePart(bytes)) };
  },
  'a film with its head changed': (roll) => {
    const bytes = film(roll);
    for (let n = 1 + roll(8); n > 0 && bytes.length > 0; n -= 1)
      bytes[roll(Math.min(600, bytes.length))] = roll(256);
    return { body: whole(filePart(bytes)) };
  },
  'a cut film': (roll) => {
    const bytes = film(roll);
    return { body: whole(filePart(bytes.subarray(0, roll(bytes.length + 1)))) };
  },
  'another boundary': (roll) => ({
    body: whole(filePart(film(roll))),
    contentType: `multipart/form-data; boundary=${roll(2) === 0 ? 'line' : 'x'.repeat(300)}`,
  }),
  'no boundary': (roll) => ({ body: whole(filePart(film(roll))), contentType: 'multipart/form-data' }),
  'a long field name': (roll) => ({
    body: whole(fieldPart('v'.repeat(1 + roll(60_000)), 'deck'), filePart(film(roll))),
  }),
  'a long value': (roll) => ({
    body: whole(fieldPart('view', 'd'.repeat(1 + roll(60_000))), filePart(film(roll))),
  }),
  'a name of another place': (roll) => ({ body: whole(filePart(film(roll), names[roll(names.length)])) }),
  'two films': (roll) => ({ body: whole(filePart(film(roll)), filePart(film(roll))) }),
  'many fields': (roll) => ({
    body: whole(...Array.from({ length: 2 + roll(200) }, (_, n) => fieldPart(`f${n}`, 'x'))),
  }),
  'a field of the language': (roll) => ({
    body: whole(
      fieldPart(['__proto__', 'constructor', 'toString', 'view[]'][roll(4)] ?? '', 'deck'),
      filePart(film(roll)),
    ),
  }),
  'a field twice': (roll) => ({
    body: whole(fieldPart('view', 'deck'), fieldPart('view', 'deck'), filePart(film(roll))),
  }),
  'a bad value': (roll) => ({
    body: whole(
      filePart(film(roll)),
      fieldPart('captureRateFactor', ['NaN', '-1', 'Infinity', '1e99', ''][roll(5)] ?? ''),
    ),
  }),
  'no film': () => ({ body: whole(fieldPart('view', 'deck')) }),
  'a film in another field': (roll) => ({
    body: whole(part('Content-Disposition: form-data; name="film"; filename="a.mp4"', film(roll))),
  }),
  'a head without end': (roll) => ({
    body: Buffer.from(`--rope\r\nContent-Disposition: ${'x'.repeat(roll(100_000))}`),
  }),
  'a part without a name': (roll) => ({ body: whole(part('Content-Disposition: form-data', film(roll))) }),
  'a broken head': (roll) => ({ body: whole(part(noise(roll, 60).toString('latin1'), film(roll))) }),
  nothing: () => ({ body: Buffer.alloc(0) }),
};

/** The n-th malformed upload: kinds take turns, everything else is rolled from the number. */
export function malformedUpload(n: number): MalformedUpload {
  const kinds = Object.keys(makers);
  const kind = kinds[n % kinds.length] ?? 'nothing';
  const { body, contentType = rope } = makers[kind]?.(dice(n)) ?? { body: Buffer.alloc(0) };
  return { kind, body, contentType };
}
