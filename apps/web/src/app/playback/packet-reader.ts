import { Input, UrlSource, type EncodedPacket } from 'mediabunny';
import { ByteSourceError } from '@stillstroke/clip-index/clip-refusal';
import { clipIndexOf, type ClipIndex } from '@stillstroke/clip-index/frame-index';
import { CLIP_FORMATS, readPacketTable, type PacketTable } from '@stillstroke/clip-index/packet-table';
import { packetWithData } from '@stillstroke/clip-index/packet-trim';
import { PacketInspector, type PacketFacts } from './bitstream';

/** Compressed bytes kept for reuse, so that going back over a group of pictures asks the network for nothing. */
const KEEP_BYTES = 96 * 2 ** 20;
/** Attempts for one range before the connection counts as lost, and seconds between them. */
const ATTEMPTS = 3;
const PAUSE_SECONDS = 0.25;

/** A packet with its data and what that says about it. */
export interface ReadPacket extends PacketFacts {
  readonly packet: EncodedPacket;
}

/** A clip's packets over HTTP ranges. */
export class PacketReader {
  private readonly startable = new Map<number, boolean>();

  private constructor(
    private readonly input: Input,
    readonly table: PacketTable,
    readonly index: ClipIndex,
    readonly config: VideoDecoderConfig | null,
    /** Entry of the presentation order for every decode position; −1 for packets that are never shown. */
    readonly rankOf: Int32Array,
    readonly inspector: PacketInspector,
    private readonly fetched: { bytes: number },
  ) {}

  static async open(mediaUrl: string): Promise<PacketReader> {
    const fetched = { bytes: 0 };
    const source = new UrlSource(mediaUrl, {
      requestInit: { credentials: 'same-origin' },
      maxCacheSize: KEEP_BYTES,
      fetchFn: fetchOrSay,
      getRetryDelay: (attempts, error) =>
        attempts < ATTEMPTS && !(error instanceof ByteSourceError && error.cause === 'refused')
          ? PAUSE_SECONDS
          : null,
      handleUnhandledError: () => undefined,
    });
    source.on('read', ({ start, end }) => {
      fetched.bytes += end - start;
    });
    const input = new Input({ source, formats: CLIP_FORMATS });
    try {
      const table = await readPacketTable(input);
      const index = await clipIndexOf(input, table);
      const config = await table.track.getDecoderConfig();
      const inspector = new PacketInspector(index.codec, config?.description);
      return new PacketReader(input, table, index, config, ranksOf(table), inspector, fetched);
    } catch (error) {
      input.dispose();
      throw error;
    }
  }

  get bytesFetched(): number {
    return this.fetched.bytes;
  }

  /** The packet at a decode position. @throws ByteSourceError when its bytes do not arrive */
  async read(position: number): Promise<ReadPacket> {
    const packet = await packetWithData(this.table.sink, this.table.packets, position);
    if (packet === null) throw new ByteSourceError(`Packet ${position} could not be read.`);
    return { packet, ...this.inspector.facts(packet.data) };
  }

  /**
   * True when decoding can start at this position. The container's word is checked in the packet: files call frames key
   * frames that are not, or that this browser does not start at.
   */
  async canStartAt(position: number): Promise<boolean> {
    if (this.table.packets[position]?.type !== 'key') return false;
    const known = this.startable.get(position);
    if (known !== undefined) return known;
    const { packet, sound } = await this.read(position);
    const found = !sound || (await this.table.track.determinePacketType(packet)) !== 'delta';
    this.startable.set(position, found);
    return found;
  }

  close(): void {
    this.input.dispose();
  }
}

function ranksOf({ packets, presentation }: PacketTable): Int32Array {
  const ranks = new Int32Array(packets.length).fill(-1);
  presentation.forEach((position, rank) => {
    ranks[position] = rank;
  });
  return ranks;
}

/** Turns every way a request can fail into one class, so that nobody mistakes it for a damaged file. */
async function fetchOrSay(resource: RequestInfo | URL, init?: RequestInit): Promise<Response> {
  let response: Response;
  try {
    response = await fetch(resource, init);
  } catch (error) {
    if (init?.signal?.aborted === true) throw error;
    throw new ByteSourceError('The connection was lost.', { cause: error });
  }
  if (response.ok) return response;
  // The server is there and has the file, but nothing at that place: it shrank, or it is empty.
  if (response.status === 416) throw new RangeError('The file ends before the data that was asked for.');
  const refused = response.status >= 400 && response.status < 500 && response.status !== 429;
  throw new ByteSourceError(`The server answered ${response.status}.`, refused ? { cause: 'refused' } : {});
}
