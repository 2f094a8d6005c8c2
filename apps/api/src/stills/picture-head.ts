/** What the first bytes of a picture say, before anything of it is decoded. */
export interface PictureHead {
  readonly kind: 'png' | 'jpeg';
  /** Pixels as stored. */
  readonly width: number;
  readonly height: number;
}

const PNG = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);

/** Recognises PNG and JPEG by their content, whatever name or type they came with; null for anything else. */
export function pictureHead(bytes: Buffer): PictureHead | null {
  const head = bytes.subarray(0, 8).equals(PNG) ? pngHead(bytes) : jpegHead(bytes);
  return head && head.width > 0 && head.height > 0 ? head : null;
}

/** The header chunk comes first: length, `IHDR`, width and height (PNG, third edition, §11.2.1). */
function pngHead(bytes: Buffer): PictureHead | null {
  if (bytes.length < 33 || bytes.toString('latin1', 12, 16) !== 'IHDR') return null;
  return { kind: 'png', width: bytes.readUInt32BE(16), height: bytes.readUInt32BE(20) };
}

/** Segments up to the first frame header (ITU-T T.81 §B.2.2): marker, length, precision, height, width. */
function jpegHead(bytes: Buffer): PictureHead | null {
  if (bytes.length < 4 || bytes.readUInt16BE(0) !== 0xffd8) return null;
  let at = 2;
  while (at + 9 < bytes.length) {
    if (bytes[at] !== 0xff) return null;
    const marker = bytes[at + 1] ?? 0;
    if (marker === 0xff) {
      at += 1;
      continue;
    }
    if (isFrame(marker))
      return { kind: 'jpeg', height: bytes.readUInt16BE(at + 5), width: bytes.readUInt16BE(at + 7) };
    // Data begins without a frame header before it, or the picture ends.
    if (marker === 0xda || marker === 0xd9) return null;
    const standsAlone = marker === 0x01 || (marker >= 0xd0 && marker <= 0xd8);
    at += standsAlone ? 2 : 2 + bytes.readUInt16BE(at + 2);
  }
  return null;
}

/** SOF0 to SOF15 without the tables and extensions that lie between them. */
function isFrame(marker: number): boolean {
  return marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker);
}
