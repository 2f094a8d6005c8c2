/** Why a figure has no value, in words that say what to do. Unknown codes get the last sentence. */
const words: Readonly<Record<string, string>> = {
  'not-reached': 'not reached in this pull',
  'too-few-marks': 'mark more frames of this pull',
  'no-marks': 'no frame of this pull is marked',
  'no-next-entry': 'set the next entry',
  'marks-do-not-reach': 'mark the frames around it',
  'joints-coincide': 'two joints lie on each other',
  'coincident-joints': 'two joints lie on each other',
  'events-out-of-order': 'the events are out of order',
  'missing-joint': 'the mark lacks a joint',
  'plumb-too-short': 'the plumb line is too short',
};

export function sayReason(code: string | null): string {
  return (code !== null && words[code]) || 'cannot be computed from these marks';
}
