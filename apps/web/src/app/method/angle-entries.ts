import type { MethodEntry } from './method-entry';

const projected =
  'It is the angle of the arm as projected into the picture. An arm that points towards the camera or away from it reads otherwise than it is, by 5 to 20 degrees for the elbow in a side view; no repeated marking shows that.';
const plusMinus =
  'The ± is the standard uncertainty: about two times in three the true projected angle lies within it, and within twice as much 95 times in 100.';

/** Angles of one mark on one frame. */
export const angleEntries = {
  forearm: {
    name: 'Forearm',
    kind: 'angle',
    what: 'How far the forearm, from elbow to wrist, stands from the vertical of the plumb.',
    steps: [
      'Turn the picture so that the plumb stands upright.',
      'Take how far the wrist lies ahead of the elbow, and how far below it.',
      'The angle whose tangent is ahead over below is the forearm.',
    ],
    written: 'β = atan2(f, d)',
    symbols: [
      ['f', 'wrist minus elbow along the direction of travel, pixels'],
      ['d', 'wrist minus elbow down the plumb, pixels'],
    ],
    unit: 'degrees',
    sign: '0° is vertical, fingers down; plus: the hand is ahead of the elbow; 90° is level. The same for both arms and both directions of travel.',
    interval: plusMinus,
    sources: [
      { source: 'plane', where: 'definition' },
      { source: 'gum2008', where: '§5.1.2, eq. (10): how the marks’ spread reaches the angle' },
    ],
    limits: [projected, 'Without a plumb it carries the whole lean of the camera.'],
  },
  upperArm: {
    name: 'Upper arm',
    kind: 'angle',
    what: 'How far the upper arm, from shoulder to elbow, stands from the vertical of the plumb.',
    steps: [
      'Turn the picture so that the plumb stands upright.',
      'Take how far the elbow lies ahead of the shoulder, and how far below it.',
      'The angle whose tangent is ahead over below is the upper arm.',
    ],
    written: 'atan2(f, d)',
    symbols: [
      ['f', 'elbow minus shoulder along the direction of travel, pixels'],
      ['d', 'elbow minus shoulder down the plumb, pixels'],
    ],
    unit: 'degrees',
    sign: '0° is straight down; plus: the elbow is ahead of the shoulder; 90° is level.',
    interval: plusMinus,
    sources: [
      { source: 'plane', where: 'definition' },
      { source: 'gum2008', where: '§5.1.2, eq. (10)' },
      { source: 'osborough2010', where: 'repeatability of a like angle under the best conditions' },
    ],
    limits: [projected, 'Without a plumb it carries the whole lean of the camera.'],
  },
  elbow: {
    name: 'Elbow',
    kind: 'angle',
    what: 'The inner angle at the elbow, between upper arm and forearm.',
    steps: [
      'Draw the lines from the elbow to the shoulder and from the elbow to the wrist.',
      'The angle between them is the elbow. The camera’s lean drops out of it.',
      'The elbow’s own mark moves both lines at once; that is counted, since taking the two lines as independent would be wrong.',
    ],
    written: 'u² = S²/a² + W²/b² + E²·c²/(a²·b²)',
    symbols: [
      ['S, E, W', 'standard uncertainty of shoulder, elbow and wrist, pixels'],
      ['a, b, c', 'shoulder to elbow, elbow to wrist, shoulder to wrist, pixels'],
      ['u', 'standard uncertainty of the angle, radians'],
    ],
    unit: 'degrees, 0 to 180',
    sign: '180° is a straight arm; smaller is more bent.',
    interval:
      'The ± is the standard uncertainty. Near straight the angle cannot read more than 180°, so a straight arm reads low: there the 95 % interval is shown instead, which is not the same to both sides.',
    sources: [
      { source: 'plane', where: 'definition, and the interval near straight' },
      { source: 'gum2008', where: '§5.1.2, eq. (10), with the shared joint after §5.2.2, eq. (13)' },
    ],
    limits: [projected, 'Above 180° less twice its ± it cannot be told from straight.'],
  },
  elbowDrop: {
    name: 'Elbow drop',
    kind: 'angle',
    what: 'How far the elbow lies off the line from shoulder to hand, seen from the shoulder.',
    steps: [
      'Draw the lines from the shoulder to the wrist and from the shoulder to the elbow.',
      'The angle from the first to the second is the drop. The camera’s lean drops out of it.',
    ],
    written: 'atan2(Wf·Ed − Wd·Ef, Wf·Ef + Wd·Ed)',
    symbols: [
      ['Wf, Wd', 'wrist minus shoulder, ahead and down, pixels'],
      ['Ef, Ed', 'elbow minus shoulder, ahead and down, pixels'],
    ],
    unit: 'degrees',
    sign: 'Plus: the elbow is on the trailing, lower side of the line (dropped); minus: on the leading side (high elbow).',
    interval: plusMinus,
    sources: [
      { source: 'plane', where: 'definition' },
      { source: 'gum2008', where: '§5.1.2, eq. (10)' },
      { source: 'virag2014', where: 'abstract: “dropped elbow” is otherwise rated by eye' },
      { source: 'yanaiHay2000', where: 'abstract: why a higher elbow is not better without limit' },
    ],
    limits: [
      projected,
      'A higher elbow is not better without limit: reaching for it loads the shoulder. There is no published norm.',
    ],
  },
} as const satisfies Record<string, MethodEntry>;
