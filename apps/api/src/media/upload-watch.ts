import type { IncomingMessage } from 'node:http';
import type { Writable } from 'node:stream';
import { cutOff, malformed } from './upload-problems';

const LOOK_EVERY_MS = 500;
/** Parsing without a disk to wait for takes no time; a parser that has not moved for so many looks never will. */
const PARSER_LOOKS = 4;
/** A sender that has sent nothing for so long (two minutes) is gone. */
const SENDER_LOOKS = 240;

/** Watches over an upload, since some broken part heads leave the parser waiting for ever without an error. */
export class UploadWatch {
  private timer: NodeJS.Timeout | undefined;

  constructor(
    private readonly req: IncomingMessage,
    private readonly parser: Writable,
  ) {}

  /**
   * Rejects once nothing moves any more; never resolves.
   *
   * @param writing whether a film is on its way to the disk, which may make the parser wait
   */
  stalled(writing: () => boolean): Promise<never> {
    let silent = 0;
    let stuck = 0;
    this.req.on('data', () => (silent = 0));
    return new Promise((_, reject) => {
      this.timer = setInterval(() => {
        const waits = !writing() && (this.parser.writableNeedDrain || this.req.readableEnded);
        stuck = waits ? stuck + 1 : 0;
        // While the parser or the disk makes the sender wait, the sender's silence is ours.
        silent = this.parser.writableNeedDrain || this.req.readableEnded ? 0 : silent + 1;
        if (stuck >= PARSER_LOOKS) reject(malformed('The upload is not well-formed multipart/form-data.'));
        if (silent >= SENDER_LOOKS) reject(cutOff());
      }, LOOK_EVERY_MS);
    });
  }

  end(): void {
    clearInterval(this.timer);
  }
}
