import { ClipRefusal, isByteSourceFailure } from '@stillstroke/clip-index/clip-refusal';
import { PlaybackError } from './frame-source';
import { FrameServer } from './frame-server';
import { PacketReader } from './packet-reader';
import { usableConfig } from './picture-decoder';
import type { ToPage, ToWorker } from './protocol';

/** One worker serves one clip: it reads, decodes and caches, and posts pictures to the page. */
let server: FrameServer | null = null;

const post = (message: ToPage, transfer: Transferable[] = []): void => {
  self.postMessage(message, { transfer });
};

const receiver = {
  picture: (id: number, image: VideoFrame): void => {
    post({ kind: 'picture', id, image }, [image]);
  },
  noPicture: (
    id: number,
    reason: Extract<ToPage, { kind: 'no-picture' }>['reason'],
    message: string,
  ): void => {
    post({ kind: 'no-picture', id, reason, message });
  },
};

self.addEventListener('message', (event: MessageEvent<ToWorker>) => {
  void handle(event.data);
});

async function handle(message: ToWorker): Promise<void> {
  switch (message.kind) {
    case 'open':
      return open(message);
    case 'frame':
      return server?.ask(message.id, message.frame, message.keep);
    case 'cancel':
      return server?.cancel(message.id);
    case 'hint':
      return server?.hint(message.direction);
    case 'stats':
      if (server !== null) post({ kind: 'stats', id: message.id, stats: server.stats() });
      return;
    case 'close':
      await server?.close();
      if (server !== null) post({ kind: 'stats', id: message.id, stats: server.stats() });
      post({ kind: 'closed', id: message.id });
      return;
  }
}

async function open(request: Extract<ToWorker, { kind: 'open' }>): Promise<void> {
  let reader: PacketReader | null = null;
  try {
    reader = await PacketReader.open(request.mediaUrl);
    refuseDisagreement(reader, request);
    const config = reader.config === null ? null : await usableConfig(reader.config);
    if (config === null) {
      throw new PlaybackError(
        'unsupported-codec',
        `This browser does not decode ${reader.index.codec.toUpperCase()}. Let the server convert the clip, or open it in another browser.`,
      );
    }
    server = new FrameServer(reader, config, request.budgetBytes, receiver);
    post({ kind: 'opened', id: request.id, index: reader.index });
  } catch (error) {
    reader?.close();
    post({ kind: 'refused', id: request.id, ...refusalOf(error) });
  }
}

/** Marks are kept by frame number, so an index that differs from the server's would put them on other pictures. */
function refuseDisagreement(reader: PacketReader, { index }: Extract<ToWorker, { kind: 'open' }>): void {
  if (index === undefined) return;
  const own = reader.index;
  const same = (a: readonly number[], b: readonly number[]): boolean =>
    a.length === b.length && a.every((value, n) => value === b[n]);
  if (same(own.timestampsUs, index.timestampsUs) && same(own.keyFrames, index.keyFrames)) return;
  throw new PlaybackError(
    'unreadable',
    'The file no longer agrees with what was read when it was uploaded. Upload the clip again.',
  );
}

function refusalOf(error: unknown): { code: PlaybackError['code']; message: string } {
  if (error instanceof PlaybackError) return { code: error.code, message: error.message };
  if (error instanceof ClipRefusal) return { code: 'unreadable', message: error.message };
  if (isByteSourceFailure(error)) {
    return {
      code: 'network',
      message: 'The clip could not be fetched. Check the connection and open it again.',
    };
  }
  return { code: 'unreadable', message: 'The clip could not be opened. Reload the page and try again.' };
}
