/** Reading and rewriting the boxes of an MP4 or QuickTime file whose frame table lies behind the picture data. */

const CONTAINERS = new Set(['moov', 'trak', 'mdia', 'minf', 'stbl', 'edts']);

/** Parses a run of boxes: `{type, body}` for leaves, `{type, children}` for containers. */
export function parseBoxes(bytes) {
  const boxes = [];
  for (let at = 0; at + 8 <= bytes.length;) {
    let size = bytes.readUInt32BE(at);
    let header = 8;
    if (size === 1) {
      size = Number(bytes.readBigUInt64BE(at + 8));
      header = 16;
    }
    if (size === 0) size = bytes.length - at;
    const type = bytes.toString('latin1', at + 4, at + 8);
    const body = bytes.subarray(at + header, at + size);
    boxes.push(CONTAINERS.has(type) ? { type, children: parseBoxes(body) } : { type, body, header });
    at += size;
  }
  return boxes;
}

/** Writes boxes back; sizes are computed anew, a leaf keeps the length of its header. */
export function writeBoxes(boxes) {
  return Buffer.concat(boxes.map(writeBox));
}

function writeBox(box) {
  const body = box.children ? writeBoxes(box.children) : box.body;
  const wide = box.header === 16;
  const header = Buffer.alloc(wide ? 16 : 8);
  header.writeUInt32BE(wide ? 1 : body.length + 8, 0);
  header.write(box.type, 4, 'latin1');
  if (wide) header.writeBigUInt64BE(BigInt(body.length + 16), 8);
  return Buffer.concat([header, body]);
}

/** The first box at a path such as `moov/trak/tkhd`. */
export function boxAt(boxes, path) {
  const [type, ...rest] = path.split('/');
  for (const box of boxes) {
    if (box.type !== type) continue;
    if (rest.length === 0) return box;
    const found = boxAt(box.children ?? [], rest.join('/'));
    if (found) return found;
  }
  return null;
}

/** Byte ranges of the samples of the first track, in decode order: `[{offset, size}]`. */
export function sampleRanges(boxes) {
  const table = boxAt(boxes, 'moov/trak/mdia/minf/stbl').children;
  const sizes = boxAt(table, 'stsz').body;
  const chunks = boxAt(table, 'stco').body;
  const runs = boxAt(table, 'stsc').body;
  const count = sizes.readUInt32BE(8);
  const ranges = [];
  let run = 0;
  for (let chunk = 0; chunk < chunks.readUInt32BE(4) && ranges.length < count; chunk += 1) {
    while (run + 1 < runs.readUInt32BE(4) && runs.readUInt32BE(8 + (run + 1) * 12) <= chunk + 1) run += 1;
    let offset = chunks.readUInt32BE(8 + chunk * 4);
    for (let n = runs.readUInt32BE(8 + run * 12 + 4); n > 0 && ranges.length < count; n -= 1) {
      const size = sizes.readUInt32BE(4) || sizes.readUInt32BE(12 + ranges.length * 4);
      ranges.push({ offset, size });
      offset += size;
    }
  }
  return ranges;
}

/** A `Buffer` of 32-bit numbers, for writing tables. */
export function words(...numbers) {
  const bytes = Buffer.alloc(numbers.length * 4);
  numbers.forEach((number, place) => bytes.writeInt32BE(number | 0, place * 4));
  return bytes;
}
