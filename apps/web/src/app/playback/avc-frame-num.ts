import { BitReader, withoutEmulation } from './bit-reader';

/** Where a picture stands among the references of its stream: `frame_num` of ITU-T H.264 §7.4.3. */
export interface FrameNum {
  readonly value: number;
  /** Others may refer to the picture. */
  readonly reference: boolean;
  /** The picture starts the stream anew; nothing after it refers across it. */
  readonly idr: boolean;
}

/** What reading `frame_num` needs of a sequence parameter set. */
export interface FrameNumSyntax {
  readonly bits: number;
  readonly separatePlanes: boolean;
}

/** Profiles whose parameter set says more about colour before it comes to the frame number (§7.3.2.1.1). */
const WITH_CHROMA_FORMAT = new Set([100, 110, 122, 244, 44, 83, 86, 118, 128, 138, 139, 134, 135]);

/** Reads the syntax from a sequence parameter set unit, its header byte included. */
export function frameNumSyntax(unit: Uint8Array): FrameNumSyntax {
  const bits = new BitReader(withoutEmulation(unit.subarray(1)));
  const profile = bits.read(8);
  bits.read(16);
  bits.exponential();
  let separatePlanes = false;
  if (WITH_CHROMA_FORMAT.has(profile)) {
    const chroma = bits.exponential();
    if (chroma === 3) separatePlanes = bits.read(1) === 1;
    bits.exponential();
    bits.exponential();
    bits.read(1);
    if (bits.read(1) === 1) skipScalingLists(bits, chroma === 3 ? 12 : 8);
  }
  return { bits: bits.exponential() + 4, separatePlanes };
}

function skipScalingLists(bits: BitReader, lists: number): void {
  for (let list = 0; list < lists; list += 1) {
    if (bits.read(1) === 0) continue;
    let last = 8;
    let next = 8;
    for (let n = 0; n < (list < 6 ? 16 : 64); n += 1) {
      if (next !== 0) next = (last + bits.signedExponential() + 256) % 256;
      last = next === 0 ? last : next;
    }
  }
}

/** Reads the frame number from a slice unit, its header byte included. */
export function frameNumOf(slice: Uint8Array, { bits, separatePlanes }: FrameNumSyntax): FrameNum {
  const header = slice[0] ?? 0;
  const reader = new BitReader(withoutEmulation(slice.subarray(1, 40)));
  reader.exponential();
  reader.exponential();
  reader.exponential();
  if (separatePlanes) reader.read(2);
  return { value: reader.read(bits), reference: (header & 0x60) !== 0, idr: (header & 0x1f) === 5 };
}

/**
 * Whether a lost picture was referred to, told from its neighbours in decode order: frame numbers count references, so
 * one is missing after a lost reference and none after any other picture (§8.2.5.2).
 */
export function lostOneWasReference(before: FrameNum, after: FrameNum, { bits }: FrameNumSyntax): boolean {
  if (after.idr) return false;
  const expected = (before.value + (before.reference ? 1 : 0)) % 2 ** bits;
  return after.value !== expected;
}
