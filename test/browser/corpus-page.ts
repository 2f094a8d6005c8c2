import { drawFrame } from '../../apps/web/src/app/playback/draw-frame';
import { openClip } from '../../apps/web/src/app/playback/open-clip';
import {
  PlaybackError,
  type FrameAnswer,
  type FrameSource,
  type FrameSourceStats,
} from '../../apps/web/src/app/playback/frame-source';
import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import { readNumber } from '../nasty-media/number-code.mjs';

/** What a frame showed: its number, `unreadable` when none could be read, or why there was no picture. */
export type Seen = number | string;

/** What tests call in the page. Clips are kept by name. */
export interface CorpusPage {
  open(name: string, url: string, budgetBytes: number, index?: ClipIndex): Promise<ClipIndex>;
  /** Opens and answers the code of the refusal, or null when the clip opened. */
  refusal(url: string): Promise<string | null>;
  /** Asks for one frame after another, reads its number and closes it. */
  look(name: string, frames: number[]): Promise<Seen[]>;
  /** Asks for all frames at once without waiting, closes what comes, and answers what each request got. */
  burst(name: string, frames: number[], keep: boolean): Promise<Seen[]>;
  /** Asks for frames and keeps their pictures open. */
  hold(name: string, frames: number[]): Promise<void>;
  letGo(): void;
  takenBack(name: string, frame: number): Promise<Seen>;
  stats(name: string): Promise<FrameSourceStats>;
  settled(name: string): Promise<FrameSourceStats>;
  close(name: string): Promise<FrameSourceStats>;
}

declare global {
  interface Window {
    corpus: CorpusPage;
  }
}

const clips = new Map<string, FrameSource>();
let held: VideoFrame[] = [];

function clip(name: string): FrameSource {
  const found = clips.get(name);
  if (found === undefined) throw new Error(`No clip ${name} is open.`);
  return found;
}

function read(source: FrameSource, answer: FrameAnswer): Seen {
  if (!answer.ok) return answer.reason;
  const { width, height } = source.index;
  const canvas = new OffscreenCanvas(width, height);
  const context = canvas.getContext('2d', { willReadFrequently: true });
  if (context === null) return 'no-context';
  context.fillStyle = '#808080';
  context.fillRect(0, 0, width, height);
  drawFrame(context, answer.image, source.index);
  answer.image.close();
  const pixels = context.getImageData(0, 0, width, height).data;
  return readNumber(width, height, (x, y) => pixels[(y * width + x) * 4 + 1] ?? 0) ?? 'unreadable';
}

async function pause(milliseconds: number): Promise<void> {
  await new Promise((resolve) => setTimeout(resolve, milliseconds));
}

window.corpus = {
  async open(name, url, budgetBytes, index) {
    const source = await openClip({ mediaUrl: url, budgetBytes, ...(index === undefined ? {} : { index }) });
    clips.set(name, source);
    return source.index;
  },
  async refusal(url) {
    try {
      await (await openClip({ mediaUrl: url, budgetBytes: 1e7 })).close();
      return null;
    } catch (error) {
      return error instanceof PlaybackError ? error.code : String(error);
    }
  },
  async look(name, frames) {
    const source = clip(name);
    const seen: Seen[] = [];
    for (const frame of frames) seen.push(read(source, await source.frame(frame)));
    return seen;
  },
  async burst(name, frames, keep) {
    const source = clip(name);
    const answers = await Promise.all(frames.map((frame) => source.frame(frame, { keep })));
    return answers.map((answer) => read(source, answer));
  },
  async hold(name, frames) {
    for (const frame of frames) {
      const answer = await clip(name).frame(frame);
      if (answer.ok) held.push(answer.image);
    }
  },
  letGo() {
    for (const image of held) image.close();
    held = [];
  },
  async takenBack(name, frame) {
    const abort = new AbortController();
    const answer = clip(name).frame(frame, { signal: abort.signal });
    abort.abort();
    return read(clip(name), await answer);
  },
  stats: (name) => clip(name).stats(),
  async settled(name) {
    let before = await clip(name).stats();
    for (;;) {
      await pause(60);
      const now = await clip(name).stats();
      if (now.packetsDecoded === before.packetsDecoded && now.cachedFrames === before.cachedFrames)
        return now;
      before = now;
    }
  },
  async close(name) {
    await clip(name).close();
    return clip(name).stats();
  },
};
