import { ALL_FORMATS, EncodedPacketSink, Input, UrlSource, type EncodedPacket } from 'mediabunny';
import { drawFrame } from '../../apps/web/src/app/playback/draw-frame';
import { openClip } from '../../apps/web/src/app/playback/open-clip';
import type { FrameSource } from '../../apps/web/src/app/playback/frame-source';
import { usableConfig } from '../../apps/web/src/app/playback/picture-decoder';

/** How often each thing is measured. */
export interface Samples {
  readonly seeks: number;
  readonly steps: number;
  readonly videoSteps: number;
}

/** Every measured duration in milliseconds. */
export interface Durations {
  open: number[];
  seek: number[];
  rawSeek: number[];
  forwardReady: number[];
  forwardPainted: number[];
  backReady: number[];
  backPainted: number[];
  drawing: number[];
  /** Until the element says that it arrived at the frame. */
  videoBack: number[];
  /** Until the frame is drawn into a canvas as well. */
  videoBackPainted: number[];
}

declare global {
  interface Window {
    bench(url: string, samples: Samples, budgetBytes: number): Promise<Durations>;
  }
}

/** Steps come as a held key repeats them: thirty a second. */
const KEY_REPEAT_MS = 33;

let seed = 5;
function random(below: number): number {
  seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
  return Math.floor((seed / 2 ** 32) * below);
}

async function timed(list: number[] | null, work: () => Promise<void> | void): Promise<void> {
  const start = performance.now();
  await work();
  list?.push(performance.now() - start);
}

const pause = (milliseconds: number): Promise<void> =>
  new Promise((resolve) => setTimeout(resolve, milliseconds));

/** Waits until the worker has nothing left to prefetch, so that it does not compete with what is measured next. */
async function quiet(source: FrameSource): Promise<void> {
  for (let last = -1; ;) {
    const { packetsDecoded } = await source.stats();
    if (packetsDecoded === last) return;
    last = packetsDecoded;
    await pause(250);
  }
}

/** Draws into a canvas of the page and reads a pixel back, which waits for the drawing to be done. */
function painter(source: FrameSource): (image: CanvasImageSource) => void {
  const canvas = document.createElement('canvas');
  canvas.width = source.index.width;
  canvas.height = source.index.height;
  document.body.replaceChildren(canvas);
  const context = canvas.getContext('2d');
  return (image) => {
    if (context === null) throw new Error('No drawing here.');
    drawFrame(context, image, source.index);
    context.getImageData(0, 0, 1, 1);
  };
}

async function picture(source: FrameSource, frame: number): Promise<VideoFrame> {
  const answer = await source.frame(frame);
  if (!answer.ok) throw new Error(`Frame ${frame}: ${answer.reason} ${answer.message}`);
  return answer.image;
}

async function measureSteps(
  source: FrameSource,
  samples: Samples,
  direction: 1 | -1,
  into: { ready: number[]; painted: number[]; drawing: number[] },
): Promise<void> {
  const paint = painter(source);
  const count = source.index.timestampsUs.length;
  const from = direction > 0 ? Math.floor(count * 0.3) : Math.floor(count * 0.7);
  (await picture(source, from)).close();
  await quiet(source);
  for (let step = 1; step <= samples.steps; step += 1) {
    await pause(KEY_REPEAT_MS);
    const start = performance.now();
    const image = await picture(source, from + direction * step);
    into.ready.push(performance.now() - start);
    paint(image);
    into.painted.push(performance.now() - start);
    await timed(into.drawing, () => {
      paint(image);
    });
    image.close();
  }
}

/** All packets in memory, so that the reference is decoding and nothing else. */
async function packetsOf(url: string) {
  const input = new Input({ source: new UrlSource(url), formats: ALL_FORMATS });
  const track = await input.getPrimaryVideoTrack();
  if (track === null) throw new Error('No video.');
  const packets: EncodedPacket[] = [];
  for await (const packet of new EncodedPacketSink(track).packets()) packets.push(packet);
  const config = await track.getDecoderConfig();
  const usable = config === null ? null : await usableConfig(config);
  if (usable === null) throw new Error('Not decodable.');
  const order = packets
    .map((_, n) => n)
    .sort((a, b) => (packets[a]?.timestamp ?? 0) - (packets[b]?.timestamp ?? 0));
  input.dispose();
  return { packets, order, config: usable };
}

/** The least that shows a frame: every packet from its key frame on, and out with it. */
async function rawSeek(
  { packets, order, config }: Awaited<ReturnType<typeof packetsOf>>,
  frame: number,
): Promise<void> {
  const target = order[frame] ?? 0;
  let start = target;
  while (start > 0 && packets[start]?.type !== 'key') start -= 1;
  const wanted = packets[target]?.microsecondTimestamp;
  let found = false;
  const decoder = new VideoDecoder({
    output: (image) => {
      found ||= image.timestamp === wanted;
      image.close();
    },
    error: (failure) => {
      throw failure;
    },
  });
  decoder.configure(config);
  for (const packet of packets.slice(start, target + 1)) decoder.decode(packet.toEncodedVideoChunk());
  await decoder.flush();
  decoder.close();
  if (!found) throw new Error(`Frame ${frame} did not come out.`);
}

async function measureVideo(
  url: string,
  source: FrameSource,
  samples: Samples,
  into: { ready: number[]; painted: number[] },
): Promise<void> {
  const paint = painter(source);
  const video = document.createElement('video');
  video.muted = true;
  video.src = url;
  await new Promise((resolve) => video.addEventListener('loadeddata', resolve, { once: true }));
  const times = source.index.timestampsUs;
  const seek = async (frame: number): Promise<void> => {
    const middle = ((times[frame] ?? 0) + (times[frame + 1] ?? 0)) / 2e6;
    const seeked = new Promise((resolve) => video.addEventListener('seeked', resolve, { once: true }));
    video.currentTime = middle;
    await seeked;
  };
  // From anywhere in a group of frames: what a step back costs depends on how far its key frame is.
  for (let step = 0; step < samples.videoSteps; step += 1) {
    const from = 1 + random(times.length - 1);
    await seek(from);
    const start = performance.now();
    await seek(from - 1);
    into.ready.push(performance.now() - start);
    paint(video);
    into.painted.push(performance.now() - start);
  }
  video.removeAttribute('src');
  video.load();
}

window.bench = async (url, samples, budgetBytes) => {
  const durations: Durations = {
    open: [],
    seek: [],
    rawSeek: [],
    forwardReady: [],
    forwardPainted: [],
    backReady: [],
    backPainted: [],
    drawing: [],
    videoBack: [],
    videoBackPainted: [],
  };
  const reopen = async (last: FrameSource | null): Promise<FrameSource> => {
    await last?.close();
    const start = performance.now();
    const opened = await openClip({ mediaUrl: url, budgetBytes });
    durations.open.push(performance.now() - start);
    return opened;
  };
  const source = await reopen(await reopen(await reopen(null)));
  const { forwardReady, backReady, forwardPainted, backPainted, drawing } = durations;
  await measureSteps(source, samples, 1, { ready: forwardReady, painted: forwardPainted, drawing });
  await measureSteps(source, samples, -1, { ready: backReady, painted: backPainted, drawing });
  const raw = await packetsOf(url);
  const count = source.index.timestampsUs.length;
  for (let n = 0; n < samples.seeks; n += 1) {
    const frame = random(count);
    await timed(n === 0 ? null : durations.rawSeek, () => rawSeek(raw, frame));
    await quiet(source);
    // A small source of its own for each seek would measure opening too; far jumps leave nothing of use in the cache.
    await picture(source, (frame + Math.floor(count / 2)) % count).then((image) => {
      image.close();
    });
    await quiet(source);
    await timed(n === 0 ? null : durations.seek, async () => {
      (await picture(source, frame)).close();
    });
    await quiet(source);
  }
  await measureVideo(url, source, samples, {
    ready: durations.videoBack,
    painted: durations.videoBackPainted,
  });
  await source.close();
  return durations;
};
