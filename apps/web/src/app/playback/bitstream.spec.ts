import { describe, expect, it } from 'vitest';
import { lostOneWasReference, type FrameNum } from './avc-frame-num';
import { BitReader, withoutEmulation } from './bit-reader';
import { PacketInspector } from './bitstream';

/** Baseline parameter set with a frame number of 4 bits: profile 66, level 30, id 0, log2_max_frame_num_minus4 0. */
const PARAMETER_SET = [0x67, 66, 0, 30, 0b11000000];
const DESCRIPTION = new Uint8Array([1, 66, 0, 30, 0xff, 0xe1, 0, PARAMETER_SET.length, ...PARAMETER_SET]);

/** A slice with first_mb 0, type 5, parameter set 0 and a frame number of 4 bits: 1 00110 1 nnnn 0… */
function slice(header: number, frameNum: number): number[] {
  const bits = `1001101${frameNum.toString(2).padStart(4, '0')}00000`;
  return [header, parseInt(bits.slice(0, 8), 2), parseInt(bits.slice(8), 2)];
}

function packet(...units: number[][]): Uint8Array {
  return Uint8Array.from(units.flatMap((unit) => [0, 0, 0, unit.length, ...unit]));
}

describe('PacketInspector on H.264', () => {
  const inspector = new PacketInspector('avc', DESCRIPTION);

  it('tells pictures that nothing refers to from others', () => {
    expect(inspector.facts(packet(slice(0x01, 3)))).toMatchObject({ sound: true, disposable: true });
    expect(inspector.facts(packet(slice(0x41, 3)))).toMatchObject({ sound: true, disposable: false });
    expect(inspector.facts(packet([0x06, 5, 1], slice(0x01, 3)))).toMatchObject({ disposable: true });
  });

  it('reads the frame number', () => {
    expect(inspector.facts(packet(slice(0x65, 0))).frameNum).toEqual({
      value: 0,
      reference: true,
      idr: true,
    });
    expect(inspector.facts(packet(slice(0x01, 13))).frameNum).toEqual({
      value: 13,
      reference: false,
      idr: false,
    });
  });

  it('finds broken structure: zeros, lengths beyond the end, a forbidden bit, no slice', () => {
    const broken = [
      new Uint8Array(40),
      Uint8Array.from([0, 0, 0, 9, 0x41]),
      packet([0xc1, 1]),
      packet([0x06, 1]),
    ];
    for (const data of [...broken, new Uint8Array(0)]) expect(inspector.facts(data).sound).toBe(false);
  });

  it('reads units by start code when there is no description', () => {
    const byStartCode = new PacketInspector('avc', undefined);
    const data = [0, 0, 0, 1, ...PARAMETER_SET, 0, 0, 1, ...slice(0x01, 9)];
    expect(byStartCode.facts(Uint8Array.from(data))).toMatchObject({
      sound: true,
      disposable: true,
      frameNum: { value: 9 },
    });
  });
});

describe('PacketInspector on other codecs', () => {
  it('knows nothing but emptiness', () => {
    const inspector = new PacketInspector('vp9', undefined);
    expect(inspector.facts(Uint8Array.from([1]))).toMatchObject({ sound: true, disposable: false });
    expect(inspector.facts(new Uint8Array(0)).sound).toBe(false);
  });
});

describe('lostOneWasReference', () => {
  const num = (value: number, reference: boolean, idr = false): FrameNum => ({ value, reference, idr });
  const syntax = { bits: 4, separatePlanes: false };

  it('counts references across the gap', () => {
    expect(lostOneWasReference(num(3, true), num(4, true), syntax)).toBe(false);
    expect(lostOneWasReference(num(3, true), num(5, true), syntax)).toBe(true);
    expect(lostOneWasReference(num(4, false), num(4, true), syntax)).toBe(false);
    expect(lostOneWasReference(num(15, true), num(0, true), syntax)).toBe(false);
    expect(lostOneWasReference(num(3, true), num(0, true, true), syntax)).toBe(false);
  });
});

describe('BitReader', () => {
  it('reads Exp-Golomb codes', () => {
    const reader = new BitReader(Uint8Array.from([0b10100110, 0b01000010, 0b10000000]));
    expect([1, 2, 3, 4, 5].map(() => reader.exponential())).toEqual([0, 1, 2, 3, 4]);
  });

  it('reads signed ones', () => {
    const reader = new BitReader(Uint8Array.from([0b10100110, 0b01000010, 0b10000000]));
    expect([1, 2, 3, 4, 5].map(() => reader.signedExponential())).toEqual([-0, 1, -1, 2, -2]);
  });

  it('takes out what keeps start codes from appearing', () => {
    expect([...withoutEmulation(Uint8Array.from([0, 0, 3, 1, 0, 0, 3, 0, 3]))]).toEqual([
      0, 0, 1, 0, 0, 0, 3,
    ]);
  });
});
