import { boxAt, parseBoxes, sampleRanges, words, writeBoxes } from './boxes.mjs';

/** Changes to a finished file that an encoder does not offer. Each takes the file's bytes and answers new ones. */

const MATRICES = {
  0: [1, 0, 0, 1],
  90: [0, 1, -1, 0],
  180: [-1, 0, 0, -1],
  270: [0, -1, 1, 0],
};

/** Edits the boxes in place; the frame table must lie behind the data, so that no offset moves. */
const editing = (edit) => (bytes) => {
  const boxes = parseBoxes(bytes);
  edit(boxes);
  return writeBoxes(boxes);
};

/** Writes the display matrix: a clockwise turn, then a flip left to right. */
export const orient = (rotation, mirrored) =>
  editing((boxes) => {
    const header = boxAt(boxes, 'moov/trak/tkhd').body;
    const [a, b, c, d] = MATRICES[rotation];
    const flip = mirrored ? -1 : 1;
    const one = 0x10000;
    words(a * flip * one, b * one, 0, c * flip * one, d * one, 0, 0, 0, 0x40000000).copy(header, 40);
  });

/** Moves the start of the only edit by a number of pictures, so that those before it are hidden. */
export const hideLeading = (pictures) =>
  editing((boxes) => {
    const list = boxAt(boxes, 'moov/trak/edts/elst').body;
    list.writeInt32BE(list.readInt32BE(12) + Math.round(pictures * sampleTicks(boxes)), 12);
  });

/** Puts an empty edit before the only one. */
export const delayStart = (seconds) =>
  editing((boxes) => {
    const list = boxAt(boxes, 'moov/trak/edts/elst');
    const perSecond = boxAt(boxes, 'moov/mvhd').body.readUInt32BE(12);
    const empty = words(Math.round(seconds * perSecond), -1, 0x10000);
    list.body = Buffer.concat([words(0, 2), empty, list.body.subarray(8, 20)]);
  });

export const dropLastKeyFlag = editing((boxes) => {
  const table = boxAt(boxes, 'moov/trak/mdia/minf/stbl/stss');
  const count = table.body.readUInt32BE(4) - 1;
  table.body = Buffer.concat([words(0, count), table.body.subarray(8, 8 + count * 4)]);
});

export const dropKeyTable = editing((boxes) => {
  const table = boxAt(boxes, 'moov/trak/mdia/minf/stbl');
  table.children = table.children.filter((box) => box.type !== 'stss');
});

/** Gives `count` pictures from `first` on no duration, so that they share the time of the next. */
export const stallClock = (first, count) =>
  editing((boxes) => {
    const times = boxAt(boxes, 'moov/trak/mdia/minf/stbl/stts');
    const all = times.body.readUInt32BE(8);
    const ticks = times.body.readUInt32BE(12);
    times.body = words(0, 3, first, ticks, count, 0, all - first - count, ticks);
  });

/** Ends the file half-way through the packet at a decode position. */
export const cutInsidePacket = (position) => (bytes) => {
  const range = sampleRanges(parseBoxes(bytes))[position];
  return bytes.subarray(0, range.offset + (range.size >> 1));
};

/** Ends the file shortly after the header of the second fragment. */
export const cutInsideSecondFragment = (bytes) => {
  const second = bytes.indexOf('moof', bytes.indexOf('moof') + 4, 'latin1');
  return bytes.subarray(0, second + 40);
};

const CLUSTER_ID = Buffer.from([0x1f, 0x43, 0xb6, 0x75]);

/** Ends a Matroska file inside its second cluster. */
export const cutInsideCluster = (bytes) => {
  const second = bytes.indexOf(CLUSTER_ID, bytes.indexOf(CLUSTER_ID) + 4);
  return bytes.subarray(0, second + 200);
};

/** Overwrites the packet of the n-th shown picture with one value. */
export const overwritePacket = (shown, value) => (bytes) => {
  const boxes = parseBoxes(bytes);
  const range = sampleRanges(boxes)[decodePosition(boxes, shown)];
  const damaged = Buffer.from(bytes);
  damaged.fill(value, range.offset, range.offset + range.size);
  return damaged;
};

/** Fills the packet of the n-th shown picture with noise from a share of its length on. */
export const scramblePacket = (shown, from) => (bytes) => {
  const boxes = parseBoxes(bytes);
  const range = sampleRanges(boxes)[decodePosition(boxes, shown)];
  const damaged = Buffer.from(bytes);
  noise(damaged.subarray(range.offset + Math.ceil(range.size * from), range.offset + range.size));
  return damaged;
};

/** Fills the n-th simple block of a Matroska file with noise, behind its own header. */
export const scrambleBlock = (nth) => (bytes) => {
  const damaged = Buffer.from(bytes);
  let at = bytes.indexOf(CLUSTER_ID);
  for (let block = -1; ;) {
    at = bytes.indexOf(0xa3, at + 1);
    const { length, width } = vint(bytes, at + 1);
    const body = at + 1 + width;
    // Track 1, in a byte of its own, tells a block from picture data that happens to look like one.
    if (bytes[body] !== 0x81 || length < 8 || body + length > bytes.length) continue;
    block += 1;
    if (block === nth) {
      noise(damaged.subarray(body + 4, body + length));
      return damaged;
    }
    at = body + length - 1;
  }
};

/** The length field of an EBML element. */
function vint(bytes, at) {
  const width = Math.clz32(bytes[at]) - 23;
  let length = bytes[at] & (0xff >> width);
  for (let n = 1; n < width; n += 1) length = length * 256 + bytes[at + n];
  return { length, width };
}

function noise(bytes) {
  let seed = 11;
  for (let at = 0; at < bytes.length; at += 1) {
    seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
    bytes[at] = seed >>> 24;
  }
}

function sampleTicks(boxes) {
  return boxAt(boxes, 'moov/trak/mdia/minf/stbl/stts').body.readUInt32BE(12);
}

/** Where the n-th picture in presentation order stands in decode order, from the composition offsets. */
function decodePosition(boxes, shown) {
  const table = boxAt(boxes, 'moov/trak/mdia/minf/stbl').children;
  const offsets = boxAt(table, 'ctts')?.body;
  if (!offsets) return shown;
  const ticks = sampleTicks(boxes);
  const times = [];
  for (let entry = 0; entry < offsets.readUInt32BE(4); entry += 1) {
    const offset = offsets.readInt32BE(12 + entry * 8);
    for (let n = offsets.readUInt32BE(8 + entry * 8); n > 0; n -= 1)
      times.push(times.length * ticks + offset);
  }
  const order = times.map((_, position) => position).sort((a, b) => times[a] - times[b]);
  return order[shown];
}
