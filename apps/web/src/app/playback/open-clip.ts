import { ClipConnection } from './clip-connection';
import { PlaybackError, type FrameSource, type OpenClipOptions } from './frame-source';

/**
 * Opens a clip for frame-exact reading. Everything is decoded in a worker of its own.
 *
 * @throws PlaybackError with a code and a sentence for the person
 */
export async function openClip(options: OpenClipOptions): Promise<FrameSource> {
  // A worker resolves addresses against its own; the page's is meant.
  const mediaUrl = new URL(options.mediaUrl, document.baseURI).href;
  assertDecodingPossible();
  const worker = new Worker(new URL('./frame.worker', import.meta.url), { type: 'module' });
  return ClipConnection.open(worker, { ...options, mediaUrl });
}

function assertDecodingPossible(): void {
  if (!globalThis.isSecureContext) {
    throw new PlaybackError(
      'insecure-context',
      'Browsers decode single frames only on secure pages. Open this address with https://, or on the machine that serves it as http://localhost.',
    );
  }
  if (typeof VideoDecoder === 'undefined' || typeof Worker === 'undefined') {
    throw new PlaybackError(
      'no-webcodecs',
      'This browser cannot decode single frames. Use a current Chrome, Edge, Safari or Firefox.',
    );
  }
}
