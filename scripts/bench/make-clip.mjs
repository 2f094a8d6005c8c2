import { existsSync, mkdirSync, renameSync, rmSync } from 'node:fs';
import { dirname } from 'node:path';

// node-av uses this function, which Node has from version 22 on.
Promise.withResolvers ??= function withResolvers() {
  let resolve;
  let reject;
  const promise = new this((onResolve, onReject) => {
    resolve = onResolve;
    reject = onReject;
  });
  return { promise, resolve, reject };
};

/**
 * Makes an H.264 clip of moving, grainy picture for measuring, unless it is there already. Uses the FFmpeg libraries that
 * come with `node-av`; nothing has to be installed.
 *
 * @param {string} path where to write it
 * @param {{width: number, height: number, rate: number, frames: number, keyEvery: number, bFrames: number}} clip
 */
export async function makeClip(path, clip) {
  if (existsSync(path)) return;
  mkdirSync(dirname(path), { recursive: true });
  const { Decoder, Demuxer, Encoder, Log, Muxer } = await import('node-av');
  const { AV_LOG_ERROR } = await import('node-av/constants');
  Log.setLevel(AV_LOG_ERROR);
  console.log(`making ${path} (once)`);
  const seconds = clip.frames / clip.rate;
  const picture = `testsrc2=size=${clip.width}x${clip.height}:rate=${clip.rate}:duration=${seconds},noise=alls=10:allf=t,format=yuv420p`;
  const unfinished = `${path}.part.mp4`;
  rmSync(unfinished, { force: true });
  const input = await Demuxer.open(picture, { format: 'lavfi' });
  const decoder = await Decoder.create(input.video());
  const options = { preset: 'veryfast', g: clip.keyEvery, bf: clip.bFrames, crf: 25, sc_threshold: 0 };
  const encoder = await Encoder.create('libx264', { decoder, options });
  const output = await Muxer.open(unfinished);
  const stream = output.addStream(encoder);
  for await (const packet of encoder.packets(decoder.frames(input.packets()))) {
    await output.writePacket(packet, stream);
    packet?.free();
  }
  await output.close();
  await input.close();
  renameSync(unfinished, path);
}
