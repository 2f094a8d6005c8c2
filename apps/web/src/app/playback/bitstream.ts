import { frameNumOf, frameNumSyntax, type FrameNum, type FrameNumSyntax } from './avc-frame-num';

/** What the packet of a picture says about itself without being decoded. */
export interface PacketFacts {
  /** False when its structure is broken, so that no decoder could make sense of it. */
  readonly sound: boolean;
  /** True when no other picture refers to this one, so that it can be left out on the way to another. */
  readonly disposable: boolean;
  /** Known for H.264 alone. */
  readonly frameNum: FrameNum | null;
}

const BROKEN: PacketFacts = { sound: false, disposable: false, frameNum: null };
/** Nothing is known: the picture has to be decoded to find out. */
const UNKNOWN: PacketFacts = { sound: true, disposable: false, frameNum: null };

const PARAMETER_SET = 7;

/** Reads packets of one clip. */
export class PacketInspector {
  private readonly lengthSize: number;
  private syntax: FrameNumSyntax | null = null;

  /**
   * @param codec as in the clip's index
   * @param description the decoder's, from the container; without one H.264 units are told apart by start codes
   */
  constructor(
    private readonly codec: string,
    description: AllowSharedBufferSource | undefined,
  ) {
    const bytes = description === undefined ? null : bytesOf(description);
    this.lengthSize = bytes === null ? 0 : ((bytes[4] ?? 0xff) & 3) + 1;
    // ISO/IEC 14496-15 §5.3.3.1: the first parameter set follows its count and its length.
    if (codec === 'avc' && bytes !== null && bytes.byteLength > 8)
      this.syntax = frameNumSyntax(bytes.subarray(8));
  }

  /**
   * H.264 (ITU-T H.264 §7.3.1, §7.4.1): slices with `nal_ref_idc` 0 are not referred to, and the forbidden bit is 0. Of
   * other codecs only an empty packet is recognised.
   */
  facts(data: Uint8Array): PacketFacts {
    if (data.byteLength === 0) return BROKEN;
    if (this.codec !== 'avc') return UNKNOWN;
    const units = this.lengthSize === 0 ? unitsByStartCode(data) : unitsByLength(data, this.lengthSize);
    if (units === null || units.some((unit) => ((unit[0] ?? 0x80) & 0x80) !== 0)) return BROKEN;
    const parameterSet = units.find((unit) => typeOf(unit) === PARAMETER_SET);
    if (parameterSet !== undefined) this.syntax = frameNumSyntax(parameterSet);
    const slices = units.filter(isSlice);
    const first = slices[0];
    if (first === undefined) return BROKEN;
    return {
      sound: true,
      disposable: slices.every((slice) => ((slice[0] ?? 0) & 0x60) === 0),
      frameNum: this.syntax === null ? null : frameNumOf(first, this.syntax),
    };
  }

  get frameNumSyntax(): FrameNumSyntax | null {
    return this.syntax;
  }
}

function typeOf(unit: Uint8Array): number {
  return (unit[0] ?? 0) & 0x1f;
}

/** Coded slices of any kind: whole, in partitions, or of an IDR picture. */
function isSlice(unit: Uint8Array): boolean {
  return typeOf(unit) >= 1 && typeOf(unit) <= 5;
}

function unitsByLength(data: Uint8Array, lengthSize: number): Uint8Array[] | null {
  const units: Uint8Array[] = [];
  let at = 0;
  while (at + lengthSize < data.byteLength) {
    let length = 0;
    for (let n = 0; n < lengthSize; n += 1) length = length * 256 + (data[at + n] ?? 0);
    at += lengthSize;
    if (length === 0 || at + length > data.byteLength) return null;
    units.push(data.subarray(at, at + length));
    at += length;
  }
  return at === data.byteLength ? units : null;
}

function unitsByStartCode(data: Uint8Array): Uint8Array[] {
  const starts: number[] = [];
  for (let at = 0; at + 3 < data.byteLength; at += 1) {
    if (data[at] === 0 && data[at + 1] === 0 && data[at + 2] === 1) starts.push(at + 3);
  }
  return starts.map((start, n) => data.subarray(start, (starts[n + 1] ?? data.byteLength + 3) - 3));
}

function bytesOf(source: AllowSharedBufferSource): Uint8Array {
  return ArrayBuffer.isView(source)
    ? new Uint8Array(source.buffer, source.byteOffset, source.byteLength)
    : new Uint8Array(source);
}
