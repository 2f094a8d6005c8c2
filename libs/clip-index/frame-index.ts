import type { Input } from 'mediabunny';
import { steadyRate } from './frame-rate';
import { readPacketTable, type PacketTable } from './packet-table';

/** Every frame of a clip and how its picture is to be shown. Plain data: it goes over the wire as it is. */
export interface ClipIndex {
  /**
   * Presentation time of every frame in whole microseconds of file time, ascending, from the first shown frame. Equal
   * neighbours are possible. The first is not always 0: a track may start later than the file.
   */
  timestampsUs: number[];
  /** Frame indices at which decoding can start, ascending. */
  keyFrames: number[];
  /** Size of the picture as shown, after pixel aspect and rotation, in whole pixels. */
  width: number;
  height: number;
  /** Size of the picture as stored, before pixel aspect and rotation. */
  codedWidth: number;
  codedHeight: number;
  /** Degrees clockwise by which the stored picture is turned to be shown. */
  rotation: 0 | 90 | 180 | 270;
  /** The picture is flipped left to right after the turn, as some front cameras ask for. */
  mirrored: boolean;
  /** Width of a stored pixel in units of its height, as far as the whole-pixel size as shown can tell. */
  pixelAspect: number;
  /** `avc`, `hevc`, `vp8`, `vp9`, `av1`, `prores`, or the container's own name for a codec that we do not know. */
  codec: string;
  /** `MP4`, `QuickTime File Format`, `Matroska`, `WebM` or `MPEG Transport Stream`. */
  container: string;
  /** From the start of the first frame to the end of the last, in whole microseconds of file time. */
  durationUs: number;
  /** Frames per second of file time; null when the rate varies or there is only one frame. */
  frameRate: number | null;
  /** The file was cut off; only the readable frames are listed. */
  truncated: boolean;
}

/**
 * Computes the frame index of an opened file, the same on server and browser.
 *
 * @param input opened with `CLIP_FORMATS`; stays open
 * @throws ClipRefusal when the file cannot become a clip; failures of the byte source pass through
 */
export async function readClipIndex(input: Input): Promise<ClipIndex> {
  return clipIndexOf(input, await readPacketTable(input));
}

/** The index of a file whose packets were listed already. */
export async function clipIndexOf(input: Input, table: PacketTable): Promise<ClipIndex> {
  const timestampsUs = frameTimes(table);
  return {
    timestampsUs,
    keyFrames: keyFramesOf(table),
    ...(await pictureOf(table)),
    codec: await codecOf(table),
    container: (await input.getFormat()).name,
    durationUs: durationOf(table, timestampsUs),
    frameRate: steadyRate(timestampsUs, await table.track.getTimeResolution()),
    truncated: table.truncated,
  };
}

/** A frame that starts before time zero and is still on screen there is shown from zero on. */
function frameTimes({ packets, presentation, hidden }: PacketTable): number[] {
  return presentation
    .slice(hidden)
    .map((position) => Math.max(0, Math.round((packets[position]?.timestamp ?? 0) * 1e6)));
}

function keyFramesOf({ packets, presentation, hidden }: PacketTable): number[] {
  const keys: number[] = [];
  presentation.forEach((position, entry) => {
    if (entry >= hidden && packets[position]?.type === 'key') keys.push(entry - hidden);
  });
  return keys;
}

async function pictureOf({ track }: PacketTable) {
  const aspect = await track.getPixelAspectRatio();
  return {
    width: Math.max(1, Math.round(await track.getDisplayWidth())),
    height: Math.max(1, Math.round(await track.getDisplayHeight())),
    codedWidth: await track.getCodedWidth(),
    codedHeight: await track.getCodedHeight(),
    rotation: await track.getRotation(),
    mirrored: await track.getFlip(),
    pixelAspect: aspect.num / aspect.den,
  };
}

async function codecOf({ track }: PacketTable): Promise<string> {
  const known = await track.getCodec();
  if (known !== null) return known;
  const internal = await track.getInternalCodecId();
  return typeof internal === 'string' || typeof internal === 'number' ? String(internal) : 'unknown';
}

/** The last frame lasts as long as its packet says or, where that is silent, as long as the one before it. */
function durationOf({ packets, presentation }: PacketTable, timestampsUs: readonly number[]): number {
  const first = timestampsUs[0] ?? 0;
  const last = timestampsUs.at(-1) ?? first;
  const packet = packets[presentation.at(-1) ?? -1];
  const ownUs = Math.round((packet?.duration ?? 0) * 1e6);
  return last - first + (ownUs > 0 ? ownUs : last - (timestampsUs.at(-2) ?? last));
}
