import { describe, expect, it } from 'vitest';
import { packFrames, unpackFrames } from './frame-blobs';

describe('frame blobs', () => {
  it('give back what was put in, to the microsecond and beyond 32 bits', () => {
    const lists = { timestampsUs: [0, 16_667, 33_333, 4_294_967_296_123], keyFrames: [0, 2, 4_000_000_000] };
    expect(unpackFrames(packFrames(lists))).toEqual(lists);
  });

  it('are little-endian whatever the machine is', () => {
    const { timestampsUs, keyFrames } = packFrames({ timestampsUs: [1], keyFrames: [258] });
    expect(timestampsUs.toString('hex')).toBe('000000000000f03f');
    expect(keyFrames.toString('hex')).toBe('02010000');
  });

  it('read a blob that lies at an odd place in a larger buffer', () => {
    const { timestampsUs } = packFrames({ timestampsUs: [5, 7], keyFrames: [] });
    const shifted = Buffer.concat([Buffer.from([9]), timestampsUs]).subarray(1);
    expect(unpackFrames({ timestampsUs: shifted, keyFrames: Buffer.alloc(0) }).timestampsUs).toEqual([5, 7]);
  });
});
