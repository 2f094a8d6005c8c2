import { closeSync, openSync, readFileSync, writeSync } from 'node:fs';
import { boxAt, parseBoxes, sampleRanges, words, writeBoxes, type Box } from '../nasty-media/boxes.mjs';

/**
 * Writes a clip as large as from a camera out of a small one: each packet `step` bytes after the last, in a file full of
 * holes, the frame table at the far end.
 *
 * @returns size of the file in bytes
 */
export function writeBigClip(source: string, path: string, step: number): number {
  const small = readFileSync(source);
  const boxes = parseBoxes(small);
  const packets = sampleRanges(boxes);
  const front = writeBoxes(boxes.filter((box) => box.type === 'ftyp'));
  const dataSize = 8 + packets.length * step;
  const offsets = packets.map((_, n) => front.length + 8 + n * step);
  moveSamples(boxes, offsets);

  const file = openSync(path, 'w');
  const mdat = Buffer.alloc(8);
  mdat.writeUInt32BE(dataSize, 0);
  mdat.write('mdat', 4, 'latin1');
  writeSync(file, Buffer.concat([front, mdat]), 0, null, 0);
  packets.forEach(({ offset, size }, n) => {
    writeSync(file, small, offset, size, offsets[n] ?? 0);
  });
  const table = writeBoxes(boxes.filter((box) => box.type === 'moov'));
  writeSync(file, table, 0, null, front.length + dataSize);
  closeSync(file);
  return front.length + dataSize + table.length;
}

/** Points the frame table at the new places, one packet to a chunk. */
function moveSamples(boxes: Box[], offsets: readonly number[]): void {
  const runs = boxAt(boxes, 'moov/trak/mdia/minf/stbl/stsc');
  const chunks = boxAt(boxes, 'moov/trak/mdia/minf/stbl/stco');
  if (runs === null || chunks === null) throw new Error('The clip has no frame table.');
  runs.body = words(0, 1, 1, 1, 1);
  chunks.body = words(0, offsets.length, ...offsets);
}
