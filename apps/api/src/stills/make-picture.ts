import { rm, writeFile } from 'node:fs/promises';
import { Probe } from '../media/probe';
import { HttpProblem } from '../platform/problem';
import type { Settings } from '../platform/settings';
import { pictureHead } from './picture-head';
import { openPicture } from './still-store';

/** Two frames of 4K beside each other. */
export const MOST_PIXELS = 2 * 4096 * 2304;
const LONGEST_SIDE = 16_384;
const TIME_LIMIT_MS = 60_000;

/** Apart from the one that looks into films, so that a picture does not wait for them. */
const probe = new Probe();

export interface MadePicture {
  readonly fileId: string;
  /** Where it lies until it is kept; gone when the caller is done with it, one way or the other. */
  readonly made: string;
  readonly width: number;
  readonly height: number;
}

/**
 * Makes a picture anew from its pixels alone, so that nothing that came along with them (place, camera, thumbnails) is
 * kept. Decoding happens in a process of its own, and only when the head says that it is a PNG or JPEG of a size that
 * can be.
 *
 * @throws HttpProblem not-a-picture or picture-too-large
 */
export async function makePicture(settings: Settings, bytes: Buffer): Promise<MadePicture> {
  const head = pictureHead(bytes);
  if (!head) throw notAPicture();
  if (head.width * head.height > MOST_PIXELS || Math.max(head.width, head.height) > LONGEST_SIDE)
    throw new HttpProblem(
      413,
      'picture-too-large',
      `The picture has ${head.width} × ${head.height} pixels; two frames of 4K beside each other are the most.`,
    );
  const { fileId, came, made } = openPicture(settings);
  try {
    await writeFile(came, bytes, { flag: 'wx' });
    const answer = await probe.ask({ kind: 'picture', picture: came, made }, TIME_LIMIT_MS);
    if (answer.kind !== 'picture' || answer.width * answer.height > MOST_PIXELS) throw notAPicture();
    return { fileId, made, width: answer.width, height: answer.height };
  } catch (error) {
    await rm(made, { force: true });
    throw error;
  } finally {
    await rm(came, { force: true });
  }
}

const notAPicture = () =>
  new HttpProblem(422, 'not-a-picture', 'This is not a picture that can be read. Send a PNG or a JPEG.');
