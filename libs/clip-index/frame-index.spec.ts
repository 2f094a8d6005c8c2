import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { BufferSource, CustomSource, FilePathSource, Input } from 'mediabunny';
import { describe, expect, it } from 'vitest';
import { ByteSourceError, ClipRefusal } from './clip-refusal';
import { readClipIndex } from './frame-index';
import { CLIP_FORMATS, readPacketTable } from './packet-table';

interface CorpusClip {
  file: string;
  note: string;
  frames: number;
  width: number;
  height: number;
  truncated: boolean;
  steady: boolean;
}

const FOLDER = fileURLToPath(new URL('../../test/nasty-media/', import.meta.url));
const manifest = JSON.parse(readFileSync(`${FOLDER}manifest.json`, 'utf8')) as {
  clips: CorpusClip[];
  refused: { file: string; code: string }[];
};

const open = (file: string): Input =>
  new Input({ source: new FilePathSource(`${FOLDER}${file}`), formats: CLIP_FORMATS });

async function indexOf(file: string) {
  const input = open(file);
  try {
    return await readClipIndex(input);
  } finally {
    input.dispose();
  }
}

describe('the index of every corpus file', () => {
  for (const clip of manifest.clips) {
    it(`${clip.file}: ${clip.note}`, async () => {
      const index = await indexOf(clip.file);
      expect(index.timestampsUs).toHaveLength(clip.frames);
      expect({ width: index.width, height: index.height }).toEqual({
        width: clip.width,
        height: clip.height,
      });
      expect(index.truncated).toBe(clip.truncated);
      expect(index.frameRate !== null).toBe(clip.steady);
      expect(index.timestampsUs.every((time) => Number.isInteger(time) && time >= 0)).toBe(true);
      expect([...index.timestampsUs].sort((a, b) => a - b)).toEqual(index.timestampsUs);
      expect(index.durationUs).toBeGreaterThan(0);
    });
  }
});

describe('what the index says of single defects', () => {
  it('keeps the spacing of a variable rate to the microsecond', async () => {
    const { timestampsUs } = await indexOf('variable-rate.mp4');
    const ticks = (n: number) => n * 3000 + 900 * ((n * n) % 5);
    const first = timestampsUs[0] ?? 0;
    expect(timestampsUs.map((time) => time - first)).toEqual(
      timestampsUs.map((_, n) => Math.round((ticks(n) * 1e6) / 90000)),
    );
  });

  it('starts at the first shown frame when an edit list hides leading ones', async () => {
    const index = await indexOf('edit-list-hidden-leading.mp4');
    expect(index.timestampsUs.slice(0, 2)).toEqual([0, 33333]);
    expect(index.keyFrames).toEqual([17]);
  });

  it('shows the frame that is on screen when an edit list starts within it', async () => {
    const index = await indexOf('edit-list-mid-frame.mp4');
    expect(index.timestampsUs.slice(0, 3)).toEqual([0, 16667, 50000]);
  });

  it('keeps the file time of a clip that starts late', async () => {
    expect((await indexOf('edit-list-late-start.mp4')).timestampsUs[0]).toBe(500000);
  });

  it('keeps equal times apart as frames of their own', async () => {
    const { timestampsUs } = await indexOf('equal-timestamps.mp4');
    expect(timestampsUs.slice(9, 14)).toEqual([300000, 333333, 333333, 333333, 366667]);
  });

  it('counts frames, not packets, where packets are never shown', async () => {
    expect((await indexOf('vp8-unseen-references.webm')).timestampsUs).toHaveLength(48);
    const table = await readPacketTable(open('vp8-unseen-references.webm'));
    expect(table.packets.length).toBeGreaterThan(48);
  });

  it('names rotation, mirroring and pixel aspect', async () => {
    expect(await indexOf('rotated-270.mp4')).toMatchObject({
      rotation: 270,
      mirrored: false,
      pixelAspect: 1,
    });
    expect(await indexOf('mirrored.mp4')).toMatchObject({ rotation: 0, mirrored: true });
    expect((await indexOf('wide-pixels-rotated.mp4')).pixelAspect).toBeCloseTo(4 / 3, 2);
  });

  it('names codec, container and rate', async () => {
    expect(await indexOf('quicktime.mov')).toMatchObject({
      codec: 'avc',
      container: 'QuickTime File Format',
      frameRate: 30000 / 1001,
    });
    expect(await indexOf('rate-240.mp4')).toMatchObject({ frameRate: 240, durationUs: 375000 });
    expect(await indexOf('hevc.mp4')).toMatchObject({ codec: 'hevc' });
  });
});

describe('refusals', () => {
  for (const { file, code } of manifest.refused) {
    it(`${file} is ${code}`, async () => {
      const refusal: unknown = await indexOf(file).catch((error: unknown) => error);
      expect(refusal).toBeInstanceOf(ClipRefusal);
      expect(refusal).toMatchObject({ code });
    });
  }

  it('passes on the failure of a source instead of blaming the file', async () => {
    const bytes = readFileSync(`${FOLDER}b-frames.mp4`);
    const source = new CustomSource({
      getSize: () => bytes.byteLength,
      read: (start, end) => {
        if (start > 1000) throw new ByteSourceError('gone');
        return new Uint8Array(bytes.subarray(start, end));
      },
    });
    await expect(readClipIndex(new Input({ source, formats: CLIP_FORMATS }))).rejects.toThrow(
      ByteSourceError,
    );
    await expect(indexOf('no-such-file.mp4')).rejects.toMatchObject({ code: 'ENOENT' });
  });

  it('never throws anything untyped at a file damaged anywhere', async () => {
    const good = readFileSync(`${FOLDER}quicktime.mov`);
    let seed = 20260301;
    const random = (below: number): number => {
      seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
      return Math.floor((seed / 2 ** 32) * below);
    };
    for (let round = 0; round < 40; round += 1) {
      const bytes = new Uint8Array(good);
      for (let hits = 0; hits < 4; hits += 1) bytes[good.length - 1 - random(3000)] = random(256);
      const input = new Input({ source: new BufferSource(bytes), formats: CLIP_FORMATS });
      const outcome: unknown = await readClipIndex(input).catch((error: unknown) => error);
      if (outcome instanceof Error) expect(outcome).toBeInstanceOf(ClipRefusal);
    }
  });
});
