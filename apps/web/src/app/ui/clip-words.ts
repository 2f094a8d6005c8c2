import type { Clip, StrokeKind, Travel, View } from '@stillstroke/contract/clip-facts';

/** What a clip is, in words: the same on every page. */

export const viewWords: Readonly<Record<View, string>> = {
  'side-underwater': 'Side, under water',
  'front-underwater': 'Front, under water',
  'side-above': 'Side, above water',
  'front-above': 'Front, above water',
  deck: 'From the deck',
};
export const travelWords: Readonly<Record<Travel, string>> = {
  right: 'swims to the right',
  left: 'swims to the left',
};
export const strokeKindWords: Readonly<Record<StrokeKind, string>> = { full: 'full stroke', drill: 'drill' };

const codecNames: Readonly<Record<string, string>> = {
  avc: 'H.264',
  hevc: 'HEVC',
  vp8: 'VP8',
  vp9: 'VP9',
  av1: 'AV1',
};

/** `Side, under water, swims to the right, full stroke`. */
export function sayView(clip: Pick<Clip, 'view' | 'travel' | 'stroke'>): string {
  return `${viewWords[clip.view]}, ${travelWords[clip.travel]}, ${strokeKindWords[clip.stroke]}`;
}

/** The facts of the file, each a few words: frames, duration, rate, picture, codec, size. */
export function factsOf(clip: Clip): readonly string[] {
  return [
    `${sayCount(clip.frameCount)} frames`,
    sayDuration(clip.durationUs),
    clip.frameRate === null ? 'variable frame rate' : `${sayRate(clip.frameRate)} frames a second`,
    ...(clip.captureRateFactor === 1 ? [] : [saySlowness(clip.captureRateFactor)]),
    `${clip.width} × ${clip.height}`,
    sayCodec(clip.codec),
    saySize(clip.sizeBytes),
  ];
}

/** What of it has been marked. */
export function sayMeasured(clip: Pick<Clip, 'markedFrames' | 'strokeCount'>): string {
  if (clip.markedFrames === 0 && clip.strokeCount === 0) return 'not marked yet';
  const frames = clip.markedFrames === 1 ? '1 frame marked' : `${clip.markedFrames} frames marked`;
  return `${frames}, ${clip.strokeCount === 1 ? '1 stroke' : `${clip.strokeCount} strokes`}`;
}

/** World seconds per file second as people set it: 0.25 plays four times slower than it was. */
export function saySlowness(captureRateFactor: number): string {
  if (captureRateFactor === 1) return 'ordinary speed';
  const times = captureRateFactor < 1 ? 1 / captureRateFactor : captureRateFactor;
  const shown = Number(times.toFixed(2));
  return captureRateFactor < 1 ? `slow motion, ${shown} times slower` : `sped up, ${shown} times faster`;
}

export function sayCodec(codec: string): string {
  return codecNames[codec.toLowerCase()] ?? codec;
}

/** Thousands apart by a narrow space, as in `1 488`. */
export function sayCount(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, '\u202f');
}

export function sayDuration(durationUs: number): string {
  const seconds = durationUs / 1_000_000;
  if (seconds < 60) return `${seconds.toFixed(1)} s`;
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, '0')} s`;
}

export function saySize(bytes: number): string {
  if (bytes < 1_000_000) return `${Math.max(1, Math.round(bytes / 1000))} kB`;
  if (bytes < 1_000_000_000) return `${(bytes / 1_000_000).toFixed(bytes < 10_000_000 ? 1 : 0)} MB`;
  return `${(bytes / 1_000_000_000).toFixed(2)} GB`;
}

function sayRate(rate: number): string {
  return String(Number(rate.toFixed(2)));
}
