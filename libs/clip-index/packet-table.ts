import {
  EncodedPacketSink,
  InputDisposedError,
  MATROSKA,
  MP4,
  MPEG_TS,
  QTFF,
  UnsupportedInputFormatError,
  WEBM,
  type EncodedPacket,
  type Input,
  type InputVideoTrack,
} from 'mediabunny';
import { ClipRefusal, isByteSourceFailure } from './clip-refusal';
import { countReadable, endsBeforeDeclared, invisiblePositions } from './packet-trim';

/**
 * The containers a clip may come in. Playlists are left out on purpose: they would make the server fetch what they
 * name. Formats that carry sound alone are left out as well.
 */
export const CLIP_FORMATS = [MP4, QTFF, MATROSKA, WEBM, MPEG_TS];

/** More pictures than this in one file is a forged frame table: 20 minutes at 240 a second are 288,000. */
const MOST_PACKETS = 400_000;

/** How often a long walk makes sure that the file really holds what its table lists. */
const CHECK_EVERY = 1 << 16;

/** Every packet of a clip's video track, without its data, and where each stands in presentation order. */
export interface PacketTable {
  readonly track: InputVideoTrack;
  readonly sink: EncodedPacketSink;
  /** All of them in decode order, never shown ones included; metadata only. */
  readonly packets: readonly EncodedPacket[];
  /** Decode positions of shown pictures in presentation order, from the first hidden one; equal times keep decode order. */
  readonly presentation: readonly number[];
  /** How many of the first entries of `presentation` an edit list hides. Frame n is entry `hidden + n`. */
  readonly hidden: number;
  /** The file ends before its content does; what can be read is in the table. */
  readonly truncated: boolean;
}

/**
 * Walks the container of an opened file and lists its pictures. Reads tables and headers, not picture data, except in
 * Matroska, whose blocks carry their own headers.
 *
 * @throws ClipRefusal when the file cannot become a clip; failures of the byte source pass through.
 */
export async function readPacketTable(input: Input): Promise<PacketTable> {
  try {
    return await readTable(input);
  } catch (error) {
    throw asRefusal(error);
  }
}

async function readTable(input: Input): Promise<PacketTable> {
  const track = await videoTrack(input);
  const sink = new EncodedPacketSink(track);
  const { listed, damaged } = await listPackets(sink);
  const readable = await countReadable(sink, listed);
  const packets = listed.slice(0, readable);
  const presentation = presentationOrder(packets, await invisiblePositions(track, sink, packets));
  if (presentation.length === 0) {
    throw new ClipRefusal(
      'no-frames',
      'The video track holds no picture that can be read. Export the clip again from the camera.',
    );
  }
  const hidden = hiddenLeading(packets, presentation);
  const truncated = damaged || readable < listed.length || (await endsBeforeDeclared(input));
  return { track, sink, packets, presentation, hidden, truncated };
}

async function videoTrack(input: Input): Promise<InputVideoTrack> {
  const tracks = await input.getTracks();
  if (tracks.length === 0) {
    throw new ClipRefusal(
      'unreadable',
      'The table that lists the frames is missing, most likely because recording or copying was interrupted. Copy the file again from the camera.',
    );
  }
  const track = await input.getPrimaryVideoTrack();
  if (track === null) {
    throw new ClipRefusal(
      'no-video-track',
      'The file has no video in it, only sound or text. Choose a video file.',
    );
  }
  return track;
}

/** Lists packets until the track ends or, in a file that was cut off, until its structure does. */
async function listPackets(sink: EncodedPacketSink): Promise<{ listed: EncodedPacket[]; damaged: boolean }> {
  const listed: EncodedPacket[] = [];
  let packet = await sink.getFirstPacket({ metadataOnly: true });
  while (packet !== null) {
    if (listed.length >= MOST_PACKETS) {
      throw new ClipRefusal(
        'unreadable',
        `The file claims more than ${MOST_PACKETS} frames. Cut it into shorter clips.`,
      );
    }
    listed.push(packet);
    if (listed.length % CHECK_EVERY === 0 && (await countReadable(sink, listed)) < listed.length) break;
    try {
      packet = await sink.getNextPacket(packet, { metadataOnly: true });
    } catch (error) {
      if (error instanceof InputDisposedError || isByteSourceFailure(error)) throw error;
      return { listed, damaged: true };
    }
  }
  return { listed, damaged: false };
}

function presentationOrder(packets: readonly EncodedPacket[], invisible: ReadonlySet<number>): number[] {
  const times = packets.map((packet) => packet.timestamp);
  return times
    .map((_, position) => position)
    .filter((position) => !invisible.has(position))
    .sort((a, b) => (times[a] ?? 0) - (times[b] ?? 0) || a - b);
}

/**
 * An edit list moves what it hides before time zero. A picture that starts before zero and is replaced only after it is
 * the first one on screen, so it counts as shown.
 */
function hiddenLeading(packets: readonly EncodedPacket[], presentation: readonly number[]): number {
  const timeAt = (entry: number): number => {
    const packet = packets[presentation[entry] ?? -1];
    return packet === undefined ? Number.POSITIVE_INFINITY : Math.round(packet.timestamp * 1e6);
  };
  let hidden = 0;
  while (hidden < presentation.length - 1 && timeAt(hidden) < 0 && timeAt(hidden + 1) <= 0) hidden += 1;
  return hidden;
}

function asRefusal(error: unknown): unknown {
  if (error instanceof ClipRefusal || error instanceof InputDisposedError || isByteSourceFailure(error))
    return error;
  if (error instanceof UnsupportedInputFormatError) {
    return new ClipRefusal(
      'not-a-video',
      'This is not a video file of a kind we read (MP4, QuickTime, Matroska, WebM, MPEG-TS). Choose the file the camera wrote.',
      { cause: error },
    );
  }
  return new ClipRefusal(
    'unreadable',
    'The file is damaged and cannot be read. Copy it again from the camera.',
    {
      cause: error,
    },
  );
}
