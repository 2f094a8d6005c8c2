import {
  MatroskaInputFormat,
  type EncodedPacket,
  type EncodedPacketSink,
  type Input,
  type InputVideoTrack,
} from 'mediabunny';

/**
 * The packet at a decode position with its data, or null when the file ends before it.
 *
 * @param packets all packets of the track in decode order, metadata only
 */
export async function packetWithData(
  sink: EncodedPacketSink,
  packets: readonly EncodedPacket[],
  position: number,
): Promise<EncodedPacket | null> {
  const listed = packets[position];
  if (listed === undefined) return null;
  const previous = packets[position - 1];
  const found = previous === undefined ? await sink.getFirstPacket() : await sink.getNextPacket(previous);
  return found !== null && found.data.byteLength === listed.byteLength ? found : null;
}

/**
 * How many packets can be read of a file that may have been cut off. A frame table at the front still lists what was
 * never written; data lies in decode order, so the last one that is there is found by halving.
 */
export async function countReadable(
  sink: EncodedPacketSink,
  packets: readonly EncodedPacket[],
): Promise<number> {
  if (packets.length === 0) return 0;
  if ((await packetWithData(sink, packets, packets.length - 1)) !== null) return packets.length;
  let readable = 0;
  let unreadable = packets.length - 1;
  while (readable < unreadable) {
    const middle = (readable + unreadable) >>> 1;
    if ((await packetWithData(sink, packets, middle)) === null) unreadable = middle;
    else readable = middle + 1;
  }
  return readable;
}

/**
 * Decode positions of packets that other pictures refer to but that are never shown. VP8 writes such helper pictures as
 * packets of their own, told apart by bit 4 of the frame tag (RFC 6386 §9.1); other codecs pack them with a shown one.
 */
export async function invisiblePositions(
  track: InputVideoTrack,
  sink: EncodedPacketSink,
  packets: readonly EncodedPacket[],
): Promise<ReadonlySet<number>> {
  const invisible = new Set<number>();
  if ((await track.getCodec()) !== 'vp8') return invisible;
  for (let position = 0; position < packets.length; position += 1) {
    const packet = await packetWithData(sink, packets, position);
    const tag = packet?.data[0];
    if (tag !== undefined && (tag & 0x10) === 0) invisible.add(position);
  }
  return invisible;
}

/**
 * True when a Matroska file was meant to be longer. Its declared length covers all tracks, so the end of the longest one
 * is what counts; half a second is left for writers that round.
 */
export async function endsBeforeDeclared(input: Input): Promise<boolean> {
  if (!((await input.getFormat()) instanceof MatroskaInputFormat)) return false;
  const declared = await input.getDurationFromMetadata();
  if (declared === null) return false;
  return (await input.computeDuration()) < declared - 0.5;
}
