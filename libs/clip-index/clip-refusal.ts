/**
 * Why a file cannot become a clip.
 *
 * - `not-a-video`: the bytes are no video container that we read.
 * - `no-video-track`: a container, but it carries sound or text only.
 * - `no-frames`: there is a video track without a single picture in it.
 * - `unreadable`: a video container whose structure is damaged beyond use, such as one whose frame table was never written.
 */
export type ClipRefusalCode = 'not-a-video' | 'no-video-track' | 'no-frames' | 'unreadable';

/** Says, in a sentence for the person who chose the file, why it was refused and what to do. */
export class ClipRefusal extends Error {
  override readonly name = 'ClipRefusal';

  constructor(
    readonly code: ClipRefusalCode,
    message: string,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}

/**
 * Thrown by a byte source that could not deliver (connection lost, access refused). The index passes it on as it is:
 * that the bytes did not arrive says nothing about the file.
 */
export class ByteSourceError extends Error {
  override readonly name = 'ByteSourceError';
}

/** True for failures of the way to the bytes rather than of the bytes: our own class, and errors of the file system. */
export function isByteSourceFailure(error: unknown): boolean {
  if (error instanceof ByteSourceError) return true;
  if (!(error instanceof Error)) return false;
  const code: unknown = 'code' in error ? error.code : undefined;
  return typeof code === 'string' && /^E[A-Z]+$/.test(code);
}
