import { lostOneWasReference } from './avc-frame-num';
import type { PacketReader } from './packet-reader';

/** Which packets of a clip cannot be decoded, and what that means for a frame. */
export class Damage {
  /** Decode position → whether other pictures refer to it. */
  private readonly found = new Map<number, boolean>();

  constructor(private readonly reader: PacketReader) {}

  has(position: number): boolean {
    return this.found.has(position);
  }

  /** Nothing has been found so far. */
  get none(): boolean {
    return this.found.size === 0;
  }

  /**
   * Notes a packet that cannot be decoded. Whether others refer to it is asked of the packet itself or, where that is
   * beyond reading, of its neighbours; when nobody knows, it counts as referred to.
   */
  async add(position: number): Promise<void> {
    this.found.set(position, await this.isReference(position));
  }

  /**
   * Why a frame whose decoding begins at `start` cannot be shown, or null. A picture decoded from a damaged one would
   * come out smeared, and a mark on it would measure nothing, so it is not shown either.
   */
  verdict(start: number, position: number): string | null {
    if (this.found.has(position))
      return 'This frame is damaged in the file and cannot be shown. Its neighbours can.';
    for (const [damaged, reference] of this.found) {
      if (reference && damaged >= start && damaged < position) {
        return 'This frame builds on one that is damaged in the file and cannot be shown. The next key frame can.';
      }
    }
    return null;
  }

  private async isReference(position: number): Promise<boolean> {
    const own = await this.reader.read(position);
    if (own.sound) return !own.disposable;
    const syntax = this.reader.inspector.frameNumSyntax;
    if (syntax === null || position === 0 || position + 1 >= this.reader.table.packets.length) return true;
    const before = (await this.reader.read(position - 1)).frameNum;
    const after = (await this.reader.read(position + 1)).frameNum;
    return before === null || after === null || lostOneWasReference(before, after, syntax);
  }
}
