/** Why a figure has no value, in words that say what to do. Unknown codes get the last sentence. */
const words: Readonly<Record<string, string>> = {
  'vertical-not-reached': 'not reached in this pull',
  'vertical-before-first-mark': 'vertical already at the first mark; mark earlier frames',
  'too-few-marks': 'mark more frames of this pull',
  'no-next-entry': 'set the next entry first',
  'no-mid-pull': 'mark the frames around mid-pull',
  'hand-behind-at-first-mark': 'the hand is past the shoulder at the first mark; mark earlier frames',
  'hand-never-under-shoulder': 'the marks end before the hand is under the shoulder',
  'mid-pull-outside-pull': 'mid-pull lies outside catch and exit; check the events',
  'missing-joint': 'place all three joints',
  'coincident-joints': 'two joints lie on each other',
  'point-not-finite': 'a joint has no usable place',
  'plumb-too-short': 'the plumb line is too short; draw it longer',
  'plumb-level': 'the plumb line lies level; draw it from top to bottom',
  'catch-not-after-entry': 'the catch must come after the entry',
  'exit-not-after-catch': 'the exit must come after the catch',
  'next-entry-not-after-exit': 'the next entry must come after the exit',
  'no-duration': 'the events have no time between them',
};

/** Words for a reason code; see the reasons of the geometry library. */
export function sayReason(code: string | null): string {
  return (code !== null && words[code]) || 'cannot be computed from these marks and events';
}
