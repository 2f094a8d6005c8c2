import { measureMeanings, unitNames, type Unit } from './measure-meanings';
import { measureSchema, type Measure } from './measures';

/**
 * Every table and column of an export, with units and meanings: the CSV files are written from this, their
 * `dictionary.csv` and the page that explains the columns are this.
 */

/** `text` cells may hold words of people; the other kinds never do. */
export type ColumnKind = 'text' | 'code' | 'number' | 'whole' | 'yes-no' | 'date';

export interface Column {
  readonly name: string;
  readonly kind: ColumnKind;
  readonly unit: string;
  readonly meaning: string;
}

export interface Table {
  readonly file: string;
  readonly about: string;
  readonly columns: readonly Column[];
}

const column =
  (kind: ColumnKind, unit = '') =>
  (name: string, meaning: string): Column => ({ name, kind, unit, meaning });
const text = column('text');
const code = column('code');
const whole = column('whole');
const yesNo = column('yes-no');
const day = column('date');
const number = column('number');
const pixels = column('number', 'pixels');
const metres = column('number', 'metres');
const degrees = column('number', 'degrees');
const micros = column('whole', 'microseconds');
const frame = column('whole', 'frame, 0-based');

const clipId = code('clip_id', 'The clip; the same in every table');
const strokeId = code('stroke_id', 'The stroke; the same in every table');
const arm = code('arm', 'left or right');
const armOrBoth = code('arm', 'left or right; both for the index of coordination, which is of both arms');
const frameNumber = frame('frame', 'Index of the frame in presentation order');
const timeUs = micros('time_us', 'Presentation time of that frame in the file');
const measure = code('measure', 'Measure by its code name; see the columns of strokes.csv');
const unit = code('unit', 'Unit of the numbers of this row: share (0–1), deg, per_min, m or m2_per_s');

const about: Table = {
  file: 'about.csv',
  about:
    'What the export is of, and when it was made; nothing else changes from one export to the next of the same data',
  columns: [
    text('key', 'Name of the fact'),
    text('value', 'The fact: format, format_version, exported_at, scope, scope_id, athlete_id, athlete_name'),
  ],
};

const sessions: Table = {
  file: 'sessions.csv',
  about: 'One row a session, by date',
  columns: [
    code('session_id', 'The session; the same in every table'),
    day('date', 'Calendar date, YYYY-MM-DD'),
    text('place', 'Where it was, in the words of whoever opened it'),
    text('note', 'Their note'),
  ],
};

const clips: Table = {
  file: 'clips.csv',
  about: 'One row a clip: what is known of the film and its set-up. The film itself is not in the export',
  columns: [
    clipId,
    code('session_id', 'The session it belongs to'),
    text('name', 'File name it came with'),
    code('sha256', 'SHA-256 of the file as uploaded, hexadecimal: the same file has the same'),
    code('view', 'Camera view: side-underwater, front-underwater, side-above, front-above or deck'),
    code('travel', 'Direction in which the swimmer travels in the picture: left or right'),
    code('stroke', 'full or drill'),
    column('number', 'world seconds per file second')(
      'capture_rate_factor',
      '1 for ordinary film, less than 1 for film stored slower than life',
    ),
    pixels('width_px', 'Width of the picture as shown, after rotation and pixel aspect'),
    pixels('height_px', 'Height of the picture as shown'),
    whole('frame_count', 'Number of frames'),
    micros('duration_us', 'Length of the file'),
    column('number', 'frames per file second')('frame_rate', 'Empty where the rate is variable'),
    pixels('plumb_top_x_px', 'Upper end of the plumb; empty where none was drawn'),
    pixels('plumb_top_y_px', 'As above'),
    pixels('plumb_bottom_x_px', 'Lower end of the plumb'),
    pixels('plumb_bottom_y_px', 'As above'),
    metres('distance_m', 'How far the swimmer travelled between two frames; empty where nobody said'),
    metres('distance_u_m', 'Its standard uncertainty'),
    frame('distance_from_frame', 'The first of the two frames'),
    frame('distance_to_frame', 'The second'),
    pixels('joint_u_shoulder_px', 'Standard uncertainty of a placed shoulder, each coordinate'),
    pixels('joint_u_elbow_px', 'The same of an elbow'),
    pixels('joint_u_wrist_px', 'The same of a wrist'),
  ],
};

const jointColumns = ['shoulder', 'elbow', 'wrist'].flatMap((joint) => [
  pixels(`${joint}_x_px`, `The ${joint}, from the left edge of the picture as shown`),
  pixels(`${joint}_y_px`, `The ${joint}, down from the top edge`),
]);

const marks: Table = {
  file: 'marks.csv',
  about: 'One row a mark: shoulder, elbow and wrist of one arm on one frame, as placed by a person',
  columns: [clipId, arm, frameNumber, timeUs, ...jointColumns],
};

const readings: Table = {
  file: 'readings.csv',
  about: 'One row a mark: the angles read from it. Angles are of the arm as projected into the picture',
  columns: [
    clipId,
    arm,
    frameNumber,
    timeUs,
    degrees(
      'forearm_deg',
      'Elbow to wrist against the plumb: 0 vertical, + hand ahead of the elbow, 90 level',
    ),
    degrees('forearm_u_deg', 'Its standard uncertainty'),
    degrees('upper_arm_deg', 'Shoulder to elbow against the plumb, signs as above'),
    degrees('upper_arm_u_deg', 'Its standard uncertainty'),
    degrees('elbow_deg', 'Interior angle at the elbow, 0–180; 180 straight'),
    degrees('elbow_u_deg', 'Its standard uncertainty'),
    degrees(
      'elbow_drop_deg',
      'At the shoulder, from the line to the wrist to the line to the elbow: + dropped, − high elbow',
    ),
    degrees('elbow_drop_u_deg', 'Its standard uncertainty'),
    yesNo('plumb_assumed', 'yes where no plumb was drawn and the vertical of the picture stands in for it'),
  ],
};

const events: Table = {
  file: 'events.csv',
  about: 'One row an event of a stroke, as chosen by a person',
  columns: [
    clipId,
    strokeId,
    arm,
    code('event', 'entry, catch, exit or next_entry'),
    code('source', 'hand-seen, or wrist-proxy where the wrist stands in for a hand that cannot be seen'),
    frameNumber,
    timeUs,
    column('number', 'seconds')(
      'world_time_s',
      'Time in the world since the first frame: file time by the capture rate factor',
    ),
  ],
};

/** `verticalAt` → `vertical_at`. */
export function snake(name: string): string {
  return name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
}

export interface MeasureColumns {
  readonly value: string;
  readonly uncertainty: string;
  readonly frame: string;
  readonly reason: string;
}

/** Names of a measure's columns in strokes.csv, unit included. */
export function measureColumns(name: Measure): MeasureColumns {
  const stem = snake(name);
  const { suffix } = unitNames[measureMeanings[name].unit];
  return {
    value: `${stem}_${suffix}`,
    uncertainty: `${stem}_u_${suffix}`,
    frame: `${stem}_frame`,
    reason: `${stem}_reason`,
  };
}

function columnsOf(name: Measure): Column[] {
  const { unit: ofMeasure, meaning } = measureMeanings[name];
  const { value, uncertainty, frame: where, reason } = measureColumns(name);
  const { words } = unitNames[ofMeasure];
  return [
    { name: value, kind: 'number', unit: words, meaning },
    { name: uncertainty, kind: 'number', unit: words, meaning: 'Its standard uncertainty' },
    frame(where, 'The frame to look at it'),
    code(reason, 'Code that says why there is no value; empty where there is one'),
  ];
}

const strokes: Table = {
  file: 'strokes.csv',
  about: 'One row a stroke, with every measure of it',
  columns: [
    clipId,
    strokeId,
    arm,
    yesNo('breath', 'yes where the swimmer breathes in this stroke'),
    ...measureSchema.options.flatMap(columnsOf),
  ],
};

const groupOf = (name: string, words: string) => [
  whole(`${name}_count`, `${words} with a value`),
  number(`${name}_mean`, 'Their mean'),
  number(`${name}_low`, 'Lower end of its 95 % interval; empty with fewer than two strokes'),
  number(`${name}_high`, 'Upper end'),
];
const difference = [
  number('difference_low', 'Lower end of its 95 % interval'),
  number('difference_high', 'Upper end'),
];
const moreStrokes = whole(
  'more_strokes',
  'About how many more strokes a side would settle a difference of this size',
);

const comparison: Table = {
  file: 'comparison.csv',
  about: 'Left against right, one row a session, split and measure; empty for a single clip',
  columns: [
    code('session_id', 'The session'),
    code('split', 'all, breathing or not_breathing: which strokes went in'),
    measure,
    unit,
    ...groupOf('left', 'Strokes of the left arm'),
    ...groupOf('right', 'Strokes of the right arm'),
    number('difference', 'Right minus left'),
    ...difference,
    code('verdict', 'left-larger, right-larger, not-distinguishable, or too-few strokes to say'),
    moreStrokes,
  ],
};

const breath: Table = {
  file: 'breath.csv',
  about: 'Breathing strokes against the others, one row a session, arm and measure; empty for a single clip',
  columns: [
    code('session_id', 'The session'),
    code('arm', 'left, right, or together: each arm compared with itself, then the mean of both'),
    measure,
    unit,
    ...groupOf('breathing', 'Strokes with a breath'),
    ...groupOf('others', 'Strokes without one'),
    number('difference', 'Breathing minus others'),
    ...difference,
    code('verdict', 'breathing-larger, others-larger, not-distinguishable, or too-few strokes to say'),
    moreStrokes,
  ],
};

const trend: Table = {
  file: 'trend.csv',
  about: 'Means of the sessions, one row a measure, arm and session; filled for an athlete',
  columns: [
    measure,
    unit,
    code('view', 'The camera view that is followed; others are not mixed in'),
    armOrBoth,
    code('session_id', 'The session'),
    day('date', 'Its date'),
    number('mean', 'Mean of the strokes'),
    number('mean_u', 'Its standard uncertainty'),
    whole('count', 'Strokes that went in'),
  ],
};

const change: Table = {
  file: 'change.csv',
  about: 'What changed from the first session to the last, one row a measure and arm; filled for an athlete',
  columns: [
    measure,
    unit,
    code('view', 'The camera view that is followed'),
    armOrBoth,
    number('change', 'Last minus first session'),
    number('change_low', 'Lower end of its 95 % interval; empty below three strokes in either session'),
    number('change_high', 'Upper end'),
    number('detectable', 'Smallest change that marking could not produce, 95 %'),
    code('verdict', 'changed, not-more-than-marking, not-more-than-strokes-vary or too-few'),
    number('slope_per_30_days', 'Weighted straight line through the sessions; empty below four sessions'),
    number('slope_low', 'Lower end of its 95 % interval'),
    number('slope_high', 'Upper end'),
    number('slope_robust', 'Median of the slopes between all pairs of sessions'),
  ],
};

const dictionary: Table = {
  file: 'dictionary.csv',
  about: 'This list: every column of every table',
  columns: [
    code('file', 'The table'),
    code('column', 'The column'),
    code('kind', 'text, code, number, whole, yes-no or date'),
    text('unit', 'Unit of the numbers; empty where there is none'),
    text('meaning', 'What it is'),
  ],
};

/** In the order in which they lie in the zip. */
export const exportTables = {
  about,
  sessions,
  clips,
  marks,
  readings,
  events,
  strokes,
  comparison,
  breath,
  trend,
  change,
  dictionary,
} as const satisfies Record<string, Table>;
export type TableName = keyof typeof exportTables;

/** `per_min` for `perMinute`: units as the tables name them. */
export const unitCode = (of: Unit): string => unitNames[of].suffix;

/** How the files are written, for people; shown with the tables. */
export const exportRules: readonly string[] = [
  'Text is UTF-8 without a byte order mark. Tables follow RFC 4180: commas, double quotes where needed, CRLF at the end of a row, one row of names first.',
  'Numbers have a decimal point and all the digits that were computed; an empty cell means that there is no value.',
  'Frames count from 0 in presentation order, times are whole microseconds of the file, coordinates pixels of the picture as shown with the origin at its upper left corner.',
  'A column whose name has _u_ holds the standard uncertainty of the column before it.',
  'Words that people typed (names, places, notes, file names) and that begin with =, +, -, @ or a tab get an apostrophe in front, so that no spreadsheet takes them for a formula. Numbers are never touched, and JSON keeps the words as they are.',
  'Two exports of the same data are the same byte for byte, except for the time of the export, which stands in one place: exportedAt in JSON, the row exported_at of about.csv.',
];
