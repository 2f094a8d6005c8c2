import type { MethodEntry } from './method-entry';

const betweenMarks =
  'Between two marked frames the arm is taken to turn evenly: the further apart the marks, the less that need be so.';
const wristForHand = 'The wrist stands in for the hand.';
const eventsByEye =
  'An event chosen by eye is taken to lie anywhere within one frame to either side of the frame chosen (our own choice); its standard uncertainty is the time of a frame over √3.';
const intervalOfShare =
  'The ± is the standard uncertainty; within 1.96 times as much to either side the true value lies 95 times in 100, as far as marks and events are concerned.';
const twoEvents = [
  { source: 'chollet2000', where: 'the events that bound the phases' },
  { source: 'seifertEvents2007', where: 'abstract: the same events' },
  { source: 'gum2008', where: '§5.1.2, eq. (10)' },
  { source: 'ownChoice', where: 'one frame to either side for an event chosen by eye' },
] as const;

function phase(name: string, what: string, from: string, to: string, limits: readonly string[]): MethodEntry {
  return {
    name,
    kind: 'measure',
    what,
    steps: [
      `Take the time from ${from} to ${to}, from the frames’ own times.`,
      'Divide it by the time from the entry to the next entry of the same hand.',
      'An event that bounds both the phase and the cycle is one input, so that its error counts once.',
    ],
    unit: 'share of the cycle, percent',
    interval: intervalOfShare,
    sources: twoEvents,
    limits: [eventsByEye, ...limits],
  };
}

const kinematic =
  'A division by movement: it says that the hand moves backward, not that it propels. Pull and push need the marks around mid-pull.';

/** Measures of a stroke, by the names under which Compare and Trend know them. */
export const measureEntries = {
  verticalAt: {
    name: 'Vertical at',
    kind: 'measure',
    what: 'The share of the pull, from catch to exit, at which the forearm first comes within the tolerance of vertical.',
    steps: [
      'Go through the marked frames of the pull in order until the forearm, turning the shorter way, comes within the tolerance (15° unless set otherwise).',
      'Find the moment between the two marks on a straight line between their forearm angles.',
      'Take the time from the catch to that moment and divide it by the time from catch to exit.',
      '“Not reached” is an answer.',
    ],
    written: 's = (t − c) / (e − c)',
    symbols: [
      ['t', 'moment the tolerance is met, by the frames’ own times'],
      ['c, e', 'times of the catch’s and the exit’s frames'],
    ],
    unit: 'share of the pull, percent',
    sign: 'Smaller is earlier.',
    interval: intervalOfShare,
    sources: [
      { source: 'plane', where: 'definition' },
      { source: 'gum2008', where: '§5.1.2, eq. (10): both marks, the plumb, catch and exit together' },
      { source: 'oneThird', where: 'the line at one third' },
    ],
    limits: [betweenMarks, eventsByEye],
  },
  peakDrop: {
    name: 'Largest elbow drop',
    kind: 'measure',
    what: 'The largest elbow drop among the marked frames from catch to exit.',
    steps: [
      'Read the elbow drop on every marked frame of the pull.',
      'Take the largest; its frame is the one shown.',
      'The largest of several uncertain readings is on average larger than the largest true one. The 95 % interval sits lower by that much.',
    ],
    unit: 'degrees',
    sign: 'Plus: dropped, behind the line from shoulder to hand; minus: the elbow stayed in front of it throughout.',
    interval:
      'The ± is the standard uncertainty of the reading on its frame. The 95 % interval allows for having picked the largest and is not the same to both sides.',
    sources: [
      { source: 'plane', where: 'definition' },
      { source: 'simulation', where: 'the interval of a largest reading' },
    ],
    limits: ['Only marked frames are looked at: a larger drop between them goes unseen.'],
  },
  elbowAtMidPull: {
    name: 'Elbow at mid-pull',
    kind: 'measure',
    what: 'The elbow’s inner angle at the moment the hand passes under the shoulder.',
    steps: [
      'Find mid-pull: the moment between two marks at which the wrist is no longer ahead of the shoulder, on a straight line between them.',
      'Read the elbow on both marks, without folding it at straight, and take the value at that moment on the line between them.',
    ],
    unit: 'degrees, 0 to 180',
    sign: '180° is a straight arm.',
    interval:
      'The ± is the standard uncertainty; near straight the 95 % interval is not the same to both sides, since the angle cannot read more than 180°.',
    sources: [
      { source: 'chollet2000', where: 'mid-pull: the hand in the vertical plane of the shoulder' },
      { source: 'gum2008', where: '§5.1.2, eq. (10)' },
    ],
    limits: [
      betweenMarks,
      wristForHand,
      'It is the projected elbow. Flexion, as some papers give it, is 180° less this angle.',
    ],
  },
  entryAndCatch: phase(
    'Entry and catch',
    'The share of the cycle from the hand’s entry until it begins to move backward.',
    'entry',
    'catch',
    ['“Begins to move backward” is judged by eye in the picture: a camera that pans moves that frame.'],
  ),
  pull: phase('Pull', 'The share of the cycle from the catch to mid-pull.', 'catch', 'mid-pull', [
    kinematic,
    wristForHand,
  ]),
  push: phase('Push', 'The share of the cycle from mid-pull to the hand’s exit.', 'mid-pull', 'exit', [
    kinematic,
    wristForHand,
  ]),
  recovery: phase(
    'Recovery',
    'The share of the cycle from the hand’s exit to its next entry.',
    'exit',
    'the next entry',
    ['Under water the exit and the next entry may be hidden by spray.'],
  ),
  strokeRate: {
    name: 'Stroke rate',
    kind: 'measure',
    what: 'Cycles a minute of one arm; a cycle is two arm strokes.',
    steps: [
      'Take the time from the entry to the next entry of the same hand, in world seconds: file time times the capture rate factor.',
      'Sixty divided by that is the rate.',
    ],
    written: 'f = 60/T,  u(f) = f·u(T)/T',
    symbols: [
      ['T', 'entry to next entry, seconds'],
      ['u(T)', 'its standard uncertainty, from the two entries'],
    ],
    unit: 'cycles a minute',
    interval: intervalOfShare,
    sources: [
      { source: 'craig1979', where: 'abstract: rate, length and speed' },
      { source: 'gum2008', where: '§5.1.2, eq. (10)' },
    ],
    limits: [
      eventsByEye,
      '“Strokes a minute” on a stop-watch may count arm strokes, which is twice as many.',
      'Slow motion needs its capture rate factor set, or every rate is off by it.',
    ],
  },
  idc: {
    name: 'Index of coordination',
    kind: 'measure',
    what: 'How the arms follow each other: the time between the end of one arm’s push and the start of the other’s pull, in percent of the cycle.',
    steps: [
      'Take two strokes of one arm and the stroke of the other arm between them.',
      'First lag: exit of the first stroke less the catch of the other arm. Second lag: exit of the other arm less the catch of the next stroke.',
      'The mean of the two lags over the mean duration of a cycle is the index.',
    ],
    written: 'IdC = ½·(LT₁ + LT₂),  u(IdC) ≈ 100·u(t)/T',
    symbols: [
      ['LT₁, LT₂', 'the two lags in percent of the cycle'],
      ['T', 'mean duration of a cycle'],
      ['u(t)', 'standard uncertainty of one event’s time'],
    ],
    unit: 'percent of the cycle',
    sign: 'Minus: catch-up, a gap between the arms; 0: opposition; plus: superposition, an overlap. Within 1.96 times its uncertainty of 0 the mode is undetermined.',
    interval: intervalOfShare,
    sources: [
      { source: 'chollet2000', where: 'definition' },
      { source: 'millet2002', where: 'summary: the lag between the arms' },
      { source: 'seifertModes2007', where: 'summary: the three modes' },
      { source: 'schnitzler2010', where: 'abstract: a higher index is not a better swimmer' },
      { source: 'gum2008', where: '§5.1.2, eq. (10)' },
    ],
    limits: [
      eventsByEye,
      'One cycle at 25 to 30 frames a second cannot tell opposition from an index of ±1.5 %.',
      'Faster is not “more positive is better”: elite swimmers have been more negative than recreational ones.',
    ],
  },
  strokeLength: {
    name: 'Stroke length',
    kind: 'measure',
    what: 'Metres travelled in one cycle, where a distance is known.',
    steps: [
      'Divide the known distance by the time taken: the speed.',
      'Divide the speed by the cycles a second.',
    ],
    written: 'SL = V / SR',
    symbols: [
      ['V', 'speed, metres a second'],
      ['SR', 'stroke rate, cycles a second'],
    ],
    unit: 'metres a cycle',
    interval: intervalOfShare,
    sources: [
      { source: 'craig1979', where: 'abstract: speed is rate times length' },
      { source: 'gum2008', where: '§5.1.2, eq. (10)' },
    ],
    limits: ['As good as the distance. Near and far arm have different scales in one side view.'],
  },
  reachAtEntry: {
    name: 'Reach ahead at the entry',
    kind: 'measure',
    what: 'How far the wrist is ahead of the shoulder on the frame of the entry, where the clip has a scale in the swimmer’s plane.',
    steps: [
      'Bring shoulder and wrist of the entry’s frame from the picture to the scale’s plane.',
      'Take the part of the way between them that lies across the plumb; ahead in the direction of travel is plus.',
    ],
    unit: 'metres',
    sign: 'Plus: the wrist ahead of the shoulder.',
    interval: intervalOfShare,
    sources: [
      { source: 'plane', where: 'from the picture to the plane, and a length in it' },
      { source: 'gum2008', where: '§5.1.2, eq. (10), slopes by small moves' },
    ],
    limits: [
      'Nearer or farther than the plane of the scale, lengths are off by a few percent: not for setting left against right.',
    ],
  },
  handDepth: {
    name: 'Deepest hand',
    kind: 'measure',
    what: 'The greatest depth of the wrist below the shoulder of the same frame, from catch to exit, where the clip has a scale in the swimmer’s plane.',
    steps: [
      'On every marked frame of the pull bring shoulder and wrist from the picture to the scale’s plane.',
      'Take the part of the way between them along the plumb, down; the largest of them is the figure.',
    ],
    unit: 'metres',
    sign: 'Plus: below the shoulder.',
    interval: intervalOfShare,
    sources: [
      { source: 'plane', where: 'from the picture to the plane, and a length in it' },
      { source: 'gum2008', where: '§5.1.2, eq. (10), slopes by small moves' },
    ],
    limits: [
      'Nearer or farther than the plane of the scale, lengths are off by a few percent: not for setting left against right.',
      'Only marked frames count: between them the hand may have been deeper.',
    ],
  },
  strokeIndex: {
    name: 'Stroke index',
    kind: 'measure',
    what: 'Speed times stroke length, where a distance is known.',
    steps: [
      'Take speed and stroke length of the same strokes and multiply them.',
      'Do so stroke by stroke and average afterwards.',
    ],
    written: 'SI = V · SL',
    unit: 'square metres a second',
    interval: intervalOfShare,
    sources: [{ source: 'costill1985', where: 'the index; its formula is from memory' }],
    limits: ['Compare it within one stroke only, and with the same swimmer at a like speed.'],
  },
} as const satisfies Record<string, MethodEntry>;
