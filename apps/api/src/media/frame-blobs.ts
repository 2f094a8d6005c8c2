import { endianness } from 'node:os';

/** How a clip's frame times and key frames lie in the database; see `clip_frames`. */
export interface FrameBlobs {
  /** Little-endian Float64 each, whole microseconds. */
  readonly timestampsUs: Buffer;
  /** Little-endian Uint32 each. */
  readonly keyFrames: Buffer;
}

export interface FrameLists {
  readonly timestampsUs: number[];
  readonly keyFrames: number[];
}

const littleEndian = endianness() === 'LE';

export function packFrames({ timestampsUs, keyFrames }: FrameLists): FrameBlobs {
  const times = Buffer.alloc(timestampsUs.length * 8);
  timestampsUs.forEach((time, n) => times.writeDoubleLE(time, n * 8));
  const keys = Buffer.alloc(keyFrames.length * 4);
  keyFrames.forEach((frame, n) => keys.writeUInt32LE(frame, n * 4));
  return { timestampsUs: times, keyFrames: keys };
}

export function unpackFrames({ timestampsUs, keyFrames }: FrameBlobs): FrameLists {
  return { timestampsUs: [...frameTimes(timestampsUs)], keyFrames: unpackKeys(keyFrames) };
}

/** Frame times without a copy into an array where the machine's byte order allows it. */
export function frameTimes(blob: Buffer): Float64Array {
  const own = new Uint8Array(blob);
  if (!littleEndian) Buffer.from(own.buffer).swap64();
  return new Float64Array(own.buffer);
}

function unpackKeys(blob: Buffer): number[] {
  return Array.from({ length: blob.length / 4 }, (_, n) => blob.readUInt32LE(n * 4));
}
