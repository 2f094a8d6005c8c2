/** The part of the clip that the strip shows, in microseconds of the file. */
export interface StripWindow {
  readonly fromUs: number;
  readonly toUs: number;
}

/** Closest zoom: this many frames stay in view, so that single frames are easy to hit. */
const fewestFrames = 12;

/** The whole clip, with the last frame's own duration. */
export function wholeClip(timesUs: readonly number[]): StripWindow {
  const first = timesUs[0] ?? 0;
  const last = timesUs.at(-1) ?? 0;
  return { fromUs: first, toUs: last + typicalFrameUs(timesUs) };
}

/** Mean time between frames; one 60th of a second for a single frame, which has none. */
export function typicalFrameUs(timesUs: readonly number[]): number {
  const span = (timesUs.at(-1) ?? 0) - (timesUs[0] ?? 0);
  return timesUs.length > 1 && span > 0 ? span / (timesUs.length - 1) : 1_000_000 / 60;
}

/** What stays in view when zooming by `factor` (> 1 closer) with the time at `share` (0–1 of the width) held in place. */
export function zoomed(
  window: StripWindow,
  whole: StripWindow,
  frameUs: number,
  factor: number,
  share: number,
): StripWindow {
  const length = window.toUs - window.fromUs;
  const most = whole.toUs - whole.fromUs;
  const wanted = Math.min(most, Math.max(Math.min(most, fewestFrames * frameUs), length / factor));
  const held = window.fromUs + share * length;
  return inside({ fromUs: held - share * wanted, toUs: held + (1 - share) * wanted }, whole);
}

/** Moved by a time, as far as the clip goes. */
export function moved(window: StripWindow, whole: StripWindow, byUs: number): StripWindow {
  return inside({ fromUs: window.fromUs + byUs, toUs: window.toUs + byUs }, whole);
}

/** The same window, moved no more than needed to have the time in view with some room in front of it. */
export function following(window: StripWindow, whole: StripWindow, timeUs: number): StripWindow {
  const length = window.toUs - window.fromUs;
  const room = length * 0.08;
  if (timeUs < window.fromUs + room) return moved(window, whole, timeUs - room - window.fromUs);
  if (timeUs > window.toUs - room) return moved(window, whole, timeUs + room - window.toUs);
  return window;
}

function inside(window: StripWindow, whole: StripWindow): StripWindow {
  const length = Math.min(window.toUs - window.fromUs, whole.toUs - whole.fromUs);
  const fromUs = Math.min(Math.max(window.fromUs, whole.fromUs), whole.toUs - length);
  return { fromUs, toUs: fromUs + length };
}

/** The frame shown at a time: the last one that began at or before it, within the clip. Times ascend. */
export function frameAt(timesUs: readonly number[], timeUs: number): number {
  let [low, high] = [0, timesUs.length - 1];
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if ((timesUs[middle] ?? Infinity) <= timeUs) low = middle;
    else high = middle - 1;
  }
  return Math.max(0, low);
}
