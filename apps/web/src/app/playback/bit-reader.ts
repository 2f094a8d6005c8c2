/** Reads a bit stream from its first byte's highest bit on. Past the end it reads zeros. */
export class BitReader {
  private at = 0;

  constructor(private readonly bytes: Uint8Array) {}

  read(count: number): number {
    let value = 0;
    for (let n = 0; n < count; n += 1) {
      const byte = this.bytes[this.at >> 3] ?? 0;
      value = value * 2 + ((byte >> (7 - (this.at & 7))) & 1);
      this.at += 1;
    }
    return value;
  }

  /** An unsigned number in Exp-Golomb code, ue(v) of ITU-T H.264 §9.1. */
  exponential(): number {
    let zeros = 0;
    while (zeros < 32 && this.at < this.bytes.length * 8 && this.read(1) === 0) zeros += 1;
    return 2 ** zeros - 1 + this.read(zeros);
  }

  /** A signed one, se(v). */
  signedExponential(): number {
    const code = this.exponential();
    return code % 2 === 1 ? (code + 1) / 2 : -code / 2;
  }
}

/** Takes out the bytes that keep start codes from appearing inside a unit (§7.4.1). */
export function withoutEmulation(bytes: Uint8Array): Uint8Array {
  const kept: number[] = [];
  let zeros = 0;
  for (const byte of bytes) {
    if (zeros >= 2 && byte === 3) {
      zeros = 0;
      continue;
    }
    kept.push(byte);
    zeros = byte === 0 ? zeros + 1 : 0;
  }
  return Uint8Array.from(kept);
}
