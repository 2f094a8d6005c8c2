import { WIDEST_GAP } from '@stillstroke/geometry/curves/resample';
import type { MethodEntry } from './method-entry';

const strokesAreTheSample = 'The strokes are the sample: a few strokes of one day say nothing of other days.';
const interval95 =
  'A 95 % interval: made this way, 19 of 20 intervals hold the true difference, as far as marks, events and the choice of strokes are concerned.';

/** What is computed over several strokes or sessions, and what every uncertainty is made of. */
export const statisticEntries = {
  uncertainty: {
    name: 'What a ± is made of',
    kind: 'statistic',
    what: 'How the spread of placed joints, of the plumb and of chosen event frames reaches a figure.',
    steps: [
      'Every placed joint has a standard uncertainty in pixels: a default for the size of the picture (2 pixels for elbow and wrist, 3 for the shoulder, at 1080 lines), replaced by the coach’s own where frames were marked again.',
      'The plumb has one from the length of its line, √2·u/L: the camera’s lean. It drops out of angles between two segments.',
      'An event frame has one from the time of a frame: half-width one frame, over √3.',
      'Each is moved a little to see how much the figure moves; the squares are added. Each part shown is what that source would leave alone; its share is its share of the squares.',
    ],
    written: 'u² = Σ (∂y/∂x)²·u²(x)',
    unit: 'that of the figure',
    interval:
      'A standard uncertainty: about two times in three the true value lies within it, 95 times in 100 within 1.96 times as much.',
    sources: [
      { source: 'gum2008', where: '§5.1.2, eq. (10) and §5.2.2, eq. (13)' },
      {
        source: 'ownChoice',
        where: 'the default spread of a joint, and one frame to either side for an event',
      },
      { source: 'osborough2010', where: 'what experts reach under the best conditions' },
    ],
    limits: [
      'First order: for very short segments it is only approximate.',
      'It knows of marks, plumb and events. What the view does to an angle (see “Projected angles”) is not in it.',
    ],
  },
  projected: {
    name: 'Projected angles',
    kind: 'statistic',
    what: 'What an arm out of the picture’s plane does to its angles.',
    steps: [
      'A segment tilted by φ out of the plane looks shorter by the cosine of φ.',
      'Its direction in the picture changes by at most the angle whose sine is (1 − cos φ)/(1 + cos φ): 1.8° at 20°, 4.1° at 30°, 9.9° at 45°.',
      'An elbow of 120° seen with its plane tilted by 30° can read from about 113° to 124°.',
    ],
    unit: 'degrees',
    interval: 'A bias, not a spread: marking more strokes does not lessen it.',
    sources: [{ source: 'projection', where: 'all numbers' }],
    limits: ['How far an arm is tilted cannot be told from one camera; a shorter segment is a hint.'],
  },
  armMean: {
    name: 'Mean of an arm',
    kind: 'statistic',
    what: 'The mean of one measure over the strokes of one arm, each stroke once.',
    steps: [
      'Add the strokes’ values and divide by their number.',
      'The 95 % interval is the mean ± t times the strokes’ standard deviation over √n, t for n − 1 degrees of freedom.',
      'It is never narrower than 1.96 times what marking alone would leave of the mean: a few strokes may agree by chance better than anybody can mark.',
    ],
    written: 'x̄ ± max(t·s/√n, 1.96·u)',
    symbols: [
      ['s', 'standard deviation between strokes, divisor n − 1'],
      ['n', 'strokes measured'],
      ['u', 'standard uncertainty of the mean from marking and what all strokes share'],
    ],
    unit: 'that of the measure',
    interval: interval95,
    sources: [{ source: 'gum2008', where: '§5.1.2, eq. (10)' }],
    limits: [strokesAreTheSample],
  },
  difference: {
    name: 'Left against right',
    kind: 'statistic',
    what: 'The difference of the arms’ means in the unit of the measure, with a 95 % interval and a verdict.',
    steps: [
      'Right mean less left mean.',
      'Standard error: the square root of s²/n of the left plus s²/n of the right (Welch, unequal spreads allowed); what both arms share and more strokes do not lessen is added.',
      'The interval is the difference ± t times the standard error, t by the degrees of freedom after Welch and Satterthwaite; never narrower than 1.96 times what marking alone would leave.',
      'Fewer than three strokes a side give no verdict.',
      'A verdict names the larger arm only where the difference stands after Holm’s correction; otherwise it is “not distinguishable”, which is not “equal”.',
    ],
    written: 'd ± max(t·√(s²/n left + s²/n right), 1.96·u)',
    symbols: [
      ['d', 'right mean − left mean'],
      ['s, n', 'standard deviation and number of strokes of each arm'],
      ['t', '97.5 % point of Student’s t with ν degrees of freedom'],
      ['u', 'standard uncertainty of the difference from marking alone'],
    ],
    unit: 'that of the measure; points for shares, degrees for angles: never a percentage of an angle',
    sign: 'Plus: the right arm is larger.',
    interval: interval95,
    sources: [
      { source: 'welch1947', where: 'the test' },
      { source: 'gum2008', where: 'G.4.1: degrees of freedom' },
      {
        source: 'robinson1987',
        where:
          'the symmetry percentage, which is not used for angles: it changes with where an angle is counted from',
      },
    ],
    limits: [
      strokesAreTheSample,
      'A difference between arms is not a fault: no cut-off for asymmetry is established.',
      'In one side view one arm is nearer; angles bear that, lengths do not.',
    ],
  },
  breath: {
    name: 'Breathing strokes against the others',
    kind: 'statistic',
    what: 'The difference between breathing strokes and the others of the same arm, on the same footing as left against right.',
    steps: [
      'Of one arm: mean of the breathing strokes less mean of the others, with the interval and verdict of “Left against right”.',
      'Of both arms together: each arm is compared with itself first and the two differences are averaged, so that a difference between the arms does not pass for one of breathing. Its squared standard error is the sum of all s²/n, over the square of the number of arms.',
      'Three strokes of either kind are needed; an arm that has not got them is left aside.',
    ],
    unit: 'that of the measure',
    sign: 'Plus: larger on breathing strokes.',
    interval: interval95,
    sources: [
      { source: 'welch1947', where: 'the test' },
      { source: 'gum2008', where: 'G.4.1: degrees of freedom of several means' },
    ],
    limits: [strokesAreTheSample],
  },
  holm: {
    name: 'Holm’s correction',
    kind: 'statistic',
    what: 'Why looking at many measures at once asks more of each.',
    steps: [
      'Sort the measures by how surely each differs, surest first.',
      'Multiply the surest one’s p by the number of measures, the next by one less, and so on; never let a later one come out surer than an earlier one.',
      'A verdict is given where the corrected p is below 0.05. So with all measures together a false verdict comes at most one time in twenty.',
    ],
    unit: 'probability, 0 to 1',
    interval:
      'The interval of each measure is that of the measure alone. So an interval may leave out zero and the verdict still be “not distinguishable”: among so many measures one such comes by chance.',
    sources: [{ source: 'holm1979', where: 'the correction' }],
    limits: ['Measures with too few strokes do not count as looked at.'],
  },
  strokesToSettle: {
    name: 'How many more strokes',
    kind: 'statistic',
    what: 'About how many more strokes a side would settle a difference of the size seen.',
    steps: [
      'Suppose that the true difference is the one seen and that strokes go on differing as they do.',
      'Find the smallest number a side at which (t for 97.5 % + t for 80 %) times the standard error is no more than the difference: it would be recognised four times in five.',
      'Beyond 200 strokes a side no number is said.',
    ],
    unit: 'strokes a side',
    interval: 'A rough guide, as uncertain as the difference itself.',
    sources: [{ source: 'ownChoice', where: 'four times in five, and 200 strokes as the end' }],
    limits: ['The difference seen by chance may be larger or smaller than the true one.'],
  },
  sessionMean: {
    name: 'Mean of a session',
    kind: 'statistic',
    what: 'One point on Trend: the mean of the strokes of one arm in one session, with its uncertainty.',
    steps: [
      'Add the strokes’ values and divide by their number.',
      'Its standard uncertainty: the larger of the strokes’ own spread and the spread that marking gives, over √n; what all strokes of the session share (the camera’s lean) is added and not lessened by more strokes.',
    ],
    written: 'u² = max(s², m²)/n + c²',
    symbols: [
      ['s', 'standard deviation between strokes'],
      ['m', 'standard uncertainty of one stroke from marking'],
      ['c', 'what all strokes of the session share'],
    ],
    unit: 'that of the measure',
    interval: 'The whiskers are 1.96 times the standard uncertainty to either side.',
    sources: [{ source: 'gum2008', where: '§5.1.2, eq. (10)' }],
    limits: ['Only sessions filmed in one view and of one stroke kind stand on one line.'],
  },
  change: {
    name: 'Changed or not',
    kind: 'statistic',
    what: 'The last session against the first, and the smallest change that counts.',
    steps: [
      'Smallest change that marking could not well produce: 1.96 times the square root of the two sessions’ squared marking uncertainties.',
      'The interval of the change is the wider of that and of what the strokes’ own spread gives (Welch).',
      '“Changed”: the change is larger than both. “Not more than marking could produce”: it is smaller than the first. Between them: not more than strokes of one session differ among themselves.',
      'Fewer than three strokes in either session give no verdict.',
    ],
    written: '1.96·√(u₁² + u₂²)',
    symbols: [['u₁, u₂', 'marking and set-up part of each session’s mean']],
    unit: 'that of the measure',
    sign: 'Plus: larger in the last session.',
    interval: interval95,
    sources: [
      { source: 'weir2005', where: 'minimal difference, 1.96·√2·SEM' },
      { source: 'hopkins2000', where: 'abstract: typical error' },
      { source: 'welch1947', where: 'the strokes’ own spread' },
    ],
    limits: [
      'Another camera place between sessions is not in it.',
      'No smallest worthwhile change is known for these angles; “changed” says nothing of better or worse.',
    ],
  },
  slope: {
    name: 'Slope',
    kind: 'statistic',
    what: 'How fast a measure moves over the sessions, per 30 days.',
    steps: [
      'From four sessions on: the straight line of least squares through the sessions’ means, those with a smaller uncertainty counting more.',
      'The interval is the wider of what the scatter about the line gives (t, n − 2) and what the sessions’ own uncertainties give.',
    ],
    unit: 'that of the measure per 30 days',
    sign: 'Plus: rising.',
    interval: interval95,
    sources: [
      { source: 'gum2008', where: '§5.1.2, eq. (10): the sessions’ own uncertainties' },
      { source: 'ownChoice', where: 'no line below four sessions' },
    ],
    limits: ['A straight line is a summary; nothing says that it goes on.'],
  },
  robustSlope: {
    name: 'Robust slope',
    kind: 'statistic',
    what: 'The middle one of the slopes between all pairs of sessions.',
    steps: [
      'Take the slope between every two sessions of different days.',
      'The median of them is the robust slope: one session gone wrong hardly moves it.',
    ],
    unit: 'that of the measure per 30 days',
    interval: 'Where it lies far from the slope beside it, a single session pulls on the line.',
    sources: [{ source: 'sen1968', where: 'the estimate' }],
    limits: ['All sessions count alike, however uncertain.'],
  },
  repeatability: {
    name: 'How closely a coach repeats a mark',
    kind: 'statistic',
    what: 'The coach’s own spread of placing joints, found by marking frames again without seeing the first marks.',
    steps: [
      'Take every frame that the same coach has marked twice, at pixels of a picture of 1080 lines.',
      'For each joint add the squared distances of both marks from their middle, x and y together, over all frames; divide by twice the number of frames; take the root. That is the spread of one placing.',
      'It stands in the uncertainties of every clip that this coach has marked most of, from ten frames on; before that the default stands.',
      'The typical error of an angle is the standard deviation of the differences of the two readings, over √2. Two single readings have to differ by 1.96·√2 of it before marking cannot explain it.',
    ],
    written: 'u² = Σ (x − x̄)²/(2n); typical error = SD of d/√2',
    unit: 'pixels at 1080 lines; degrees',
    interval: 'With ten frames the spread itself is known to about a sixth.',
    sources: [
      { source: 'hopkins2000', where: 'typical error' },
      { source: 'weir2005', where: 'the smallest change that can be detected' },
      { source: 'ownChoice', where: 'ten frames, and one spread for each clip' },
    ],
    limits: [
      'A coach who places a joint in the wrong place twice repeats it well: it is no check against the truth.',
      'Marks made again on the same day may be closer than those of another month.',
    ],
  },
  agreement: {
    name: 'How two coaches agree',
    kind: 'statistic',
    what: 'The differences between two coaches’ readings of the same frames.',
    steps: [
      'On every frame that both have marked, take the first coach’s angle less the second’s.',
      'Their mean is the steady difference, with a 95 % interval from Student’s t.',
      'The limits are the mean and 1.96 standard deviations to either side: 95 of 100 single differences are expected between them. Each limit has its own interval, with standard error √(3·SD²/n).',
      'A steady difference is called small when it is no more than placing leaves: the root mean square over the frames of √(u₁² + u₂²), u each coach’s own, without the camera’s lean, which both readings share.',
    ],
    written: 'd̄ ± 1.96·SD',
    unit: 'degrees',
    sign: 'Plus: the first coach reads more.',
    interval: 'Beside the mean: 95 % of that mean. Beside a limit: 95 % of that limit.',
    sources: [{ source: 'blandAltman1986', where: 'bias and limits; 1.96 where the paper writes 2' }],
    limits: [
      'With fewer than three frames nothing is said, and with few the limits are wide open.',
      'It does not say which of the two is right.',
    ],
  },
  curves: {
    name: 'Curves over the pull',
    kind: 'statistic',
    what: 'Forearm or elbow drop over the pull in percent, stroke by stroke, and their mean and spread.',
    steps: [
      'Place every marked frame at its share of the time from catch to exit.',
      `Between two neighbouring marks draw a straight line, but only where they are no more than ${WIDEST_GAP * 100} % of the pull apart; nothing before the first mark and nothing after the last.`,
      'Read every stroke at each of the 101 percents that its marks support. At each percent take the mean and the standard deviation (divisor n − 1) of the strokes that are there.',
      'The mean is drawn where at least two strokes support it; the band is one standard deviation to either side.',
    ],
    unit: 'degrees',
    interval:
      'The band shows how strokes differ, about two of three lie in it. It is not an interval of the mean, and no test is made of it.',
    sources: [
      { source: 'ownChoice', where: 'straight lines, and the widest gap' },
      { source: 'roislien2012', where: 'abstract: why no coefficient of likeness is shown' },
    ],
    limits: [
      'Peaks flatten in a mean when strokes reach them at different moments; see “Largest elbow drop” for each stroke’s own.',
      'With three to six strokes an arm no claim is made percent by percent.',
    ],
  },
} as const satisfies Record<string, MethodEntry>;
