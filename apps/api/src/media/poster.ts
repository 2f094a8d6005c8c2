import { writeFile } from 'node:fs/promises';
import { registerMediabunnyServer } from '@mediabunny/server';
import { Jimp } from 'jimp';
import { VideoSampleSink, type Input, type InputVideoTrack, type VideoSample } from 'mediabunny';
import type { PosterWish } from './poster-wish';

const POSTER_WIDTH = 640;
const JPEG_QUALITY = 78;

let decodersReady = false;

/** Decodes the frame shown at a time and writes it, upright and in its true proportions, as a small JPEG. */
export async function writePoster(input: Input, wish: PosterWish): Promise<void> {
  if (!decodersReady) registerMediabunnyServer();
  decodersReady = true;
  const track = await input.getPrimaryVideoTrack();
  if (track === null) throw new Error('no video track');
  const sample = await firstDecodable(track, wish.atUs);
  try {
    const picture = upright(await pixelsOf(sample), await track.getRotation(), await track.getFlip());
    const width = Math.min(POSTER_WIDTH, wish.width);
    const height = Math.max(1, Math.round((width * wish.height) / wish.width));
    picture.resize({ w: width, h: height });
    await writeFile(wish.poster, await picture.getBuffer('image/jpeg', { quality: JPEG_QUALITY }));
  } finally {
    sample.close();
  }
}

async function firstDecodable(track: InputVideoTrack, timesUs: readonly number[]): Promise<VideoSample> {
  let failure: unknown = new Error('no frame at any of the times');
  for (const timeUs of timesUs) {
    try {
      // The time is rounded to microseconds: a hair before the frame, the one before it would be shown.
      const seconds = (timeUs + 1) / 1e6;
      // A decoder that has given up once is not asked again.
      const sample = await new VideoSampleSink(track).getSample(seconds);
      if (sample !== null) return sample;
    } catch (error) {
      failure = error;
    }
  }
  throw failure;
}

type Picture = Awaited<ReturnType<typeof pixelsOf>>;

async function pixelsOf(sample: VideoSample) {
  const options = { format: 'RGBA' } as const;
  const data = new Uint8Array(sample.allocationSize(options));
  await sample.copyTo(data, options);
  const { width, height } = sample.visibleRect;
  return new Jimp({ data: Buffer.from(data.buffer), width, height });
}

/** Pixels come as stored; the container says by how much (degrees clockwise) and whether mirrored they are shown. */
function upright(picture: Picture, clockwise: number, mirrored: boolean): Picture {
  if (clockwise !== 0) picture.rotate({ deg: -clockwise, mode: true });
  if (mirrored) picture.flip({ horizontal: true, vertical: false });
  return picture;
}
