import { existsSync, statSync } from 'node:fs';
import type { ClipRefusalCode } from '@stillstroke/clip-index/clip-refusal';
import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import type { ProblemCode } from '@stillstroke/contract/problem';
import { HttpProblem } from '../platform/problem';
import type { Settings } from '../platform/settings';
import { filmPath, posterPath } from './clip-store';
import { Probe } from './probe';

type Limits = Settings['limits'];

/** Reading a container's tables goes faster than this; what takes longer is made to, or lies on a failing disk. */
const BYTES_PER_MS = 10_000;
const LEAST_INDEX_MS = 10_000;
const POSTER_MS = 30_000;

/** Codecs that every browser with WebCodecs shows, by the names of the frame index. */
const shownEverywhere = new Set(['avc', 'vp8', 'vp9', 'av1']);
const codecNames: Record<string, string> = {
  hevc: 'HEVC (H.265)',
  prores: 'Apple ProRes',
  avc: 'H.264',
  mpeg4: 'MPEG-4 Part 2',
};

/** Two at a time: one slow or hostile file does not hold up everybody's uploads. */
const probes = [new Probe(), new Probe()];
let nextProbe = 0;

function probe(): Probe {
  nextProbe = (nextProbe + 1) % probes.length;
  return probes[nextProbe] ?? new Probe();
}

/**
 * Recognises the film in an arrived clip's folder by its content and computes its frame index.
 *
 * @throws HttpProblem that says why the file cannot become a clip and what to do
 */
export async function recogniseFilm(folder: string, limits: Limits): Promise<ClipIndex> {
  const film = filmPath(folder);
  const limitMs = LEAST_INDEX_MS + statSync(film).size / BYTES_PER_MS;
  const answer = await probe().ask({ kind: 'index', film }, limitMs);
  if (answer.kind === 'refused') throw refusal(refusedAs[answer.code], answer.message);
  if (answer.kind !== 'index') {
    throw refusal('unreadable-video', 'The file cannot be read as a video. Copy it again from the camera.');
  }
  checkCodec(answer.index);
  checkSize(answer.index, limits);
  return answer.index;
}

const refusedAs: Record<ClipRefusalCode, ProblemCode> = {
  'not-a-video': 'not-a-video',
  'no-video-track': 'no-video-track',
  'no-frames': 'no-frames',
  unreadable: 'unreadable-video',
};

const refusal = (code: ProblemCode, detail: string) => new HttpProblem(422, code, detail);

function checkCodec({ codec }: ClipIndex): void {
  if (shownEverywhere.has(codec)) return;
  // What a file calls its codec is for people to read here: nothing but letters, digits and a few signs of it.
  const name = codecNames[codec] ?? codec.replace(/[^\w .-]/g, '').slice(0, 20);
  throw refusal(
    'unsupported-codec',
    `The video is coded as ${name || 'something unknown'}, which browsers cannot show. Set the camera to H.264 ("most compatible"), or export the clip as H.264.`,
  );
}

function checkSize(index: ClipIndex, { clipMinutes, pictureSide }: Limits): void {
  if (index.durationUs > clipMinutes * 60e6) {
    const minutes = (index.durationUs / 60e6).toFixed(1);
    throw refusal(
      'clip-too-long',
      `The clip lasts ${minutes} minutes; at most ${clipMinutes} are taken. Cut it to the lengths you want to look at.`,
    );
  }
  const side = Math.max(index.width, index.height, index.codedWidth, index.codedHeight);
  if (side > pictureSide) {
    throw refusal(
      'picture-too-large',
      `The picture is ${index.width} × ${index.height} pixels; at most ${pictureSide} a side are taken. Export it smaller, such as 3840 × 2160.`,
    );
  }
}

/** Makes the poster from a frame about one third in. A film of which none can be made is a good film all the same. */
export async function makePoster(folder: string, index: ClipIndex): Promise<boolean> {
  const poster = posterPath(folder);
  const answer = await probe().ask(
    {
      kind: 'poster',
      film: filmPath(folder),
      poster,
      atUs: posterTimes(index),
      width: index.width,
      height: index.height,
    },
    POSTER_MS,
  );
  return answer.kind === 'poster' && existsSync(poster);
}

/** A frame about one third in, the key frame before it, and the first. */
function posterTimes({ timestampsUs, keyFrames }: ClipIndex): number[] {
  const third = Math.floor(timestampsUs.length / 3);
  const key = keyFrames.findLast((frame) => frame <= third) ?? 0;
  return [third, key, 0].map((frame) => timestampsUs[frame] ?? 0);
}
