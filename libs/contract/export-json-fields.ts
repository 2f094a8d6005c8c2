import { measureSchema } from './measures';
import { measureMeanings, unitNames } from './measure-meanings';

export interface JsonField {
  readonly path: string;
  readonly meaning: string;
}

const field = (path: string, meaning: string): JsonField => ({ path, meaning });
const clip = 'sessions[].clips[]';
const stroke = `${clip}.strokes[]`;
const mark = `${clip}.marks[]`;
const row = 'sessions[].comparison[]';
const breath = 'sessions[].breath[]';

const figureMeaning = measureSchema.options
  .map((name) => `${name} (${unitNames[measureMeanings[name].unit].words})`)
  .join(', ');

/** Every field of the JSON file, by its path; `[]` stands for each item of a list, `.*` for each name of a map. */
export const jsonFields: readonly JsonField[] = [
  field('format.name', 'Always stillstroke-export'),
  field('format.version', 'Version of the format; a file of another version is refused'),
  field(
    'exportedAt',
    'When it was exported, ISO 8601 UTC; the one thing that differs between exports of the same data',
  ),
  field('scope.kind', 'clip, session or athlete'),
  field('scope.id', 'Which one'),
  field('athlete.id', 'The athlete'),
  field('athlete.name', 'Name as the club wrote it'),
  field('sessions[].id', 'The session'),
  field('sessions[].date', 'Calendar date, YYYY-MM-DD'),
  field('sessions[].place', 'Where, or null'),
  field('sessions[].note', 'Note, or null'),
  field(`${clip}.id`, 'The clip'),
  field(`${clip}.name`, 'File name it came with'),
  field(`${clip}.view`, 'Camera view'),
  field(`${clip}.travel`, 'Direction in which the swimmer travels in the picture'),
  field(`${clip}.stroke`, 'full or drill'),
  field(`${clip}.captureRateFactor`, 'World seconds per file second'),
  field(
    `${clip}.fieldOfView.deg`,
    'Degrees between the side edges of the picture; fieldOfView is null while nobody has said it',
  ),
  field(`${clip}.fieldOfView.medium`, 'Measured in water or in air'),
  field(`${clip}.plumb.top.x`, 'Upper end of the plumb, pixels; plumb is null where none was drawn'),
  field(`${clip}.plumb.top.y`, 'As above'),
  field(`${clip}.plumb.bottom.x`, 'Lower end of the plumb, pixels'),
  field(`${clip}.plumb.bottom.y`, 'As above'),
  field(
    `${clip}.distance.metres`,
    'How far the swimmer travelled between two frames; distance is null where nobody said',
  ),
  field(`${clip}.distance.uncertaintyM`, 'Its standard uncertainty, metres'),
  field(`${clip}.distance.fromFrame`, 'The first of the two frames'),
  field(`${clip}.distance.toFrame`, 'The second'),
  field(`${clip}.width`, 'Pixels as shown'),
  field(`${clip}.height`, 'Pixels as shown'),
  field(`${clip}.frameCount`, 'Number of frames'),
  field(`${clip}.durationUs`, 'Length, microseconds'),
  field(`${clip}.frameRate`, 'Frames per file second; null when variable'),
  field(`${clip}.codec`, 'How the pictures are coded'),
  field(`${clip}.container`, 'Kind of file'),
  field(`${clip}.sizeBytes`, 'Size of the file, bytes'),
  field(`${clip}.sha256`, 'SHA-256 of the file as uploaded; by it the clip is found again'),
  field(`${clip}.cutOff`, 'Whether the file ends in the middle'),
  field(`${clip}.createdAt`, 'When it was uploaded, ISO 8601 UTC'),
  field(
    `${clip}.jointUncertaintyPx.shoulder`,
    'Standard uncertainty of a placed shoulder, pixels, each coordinate',
  ),
  field(`${clip}.jointUncertaintyPx.elbow`, 'The same of an elbow'),
  field(`${clip}.jointUncertaintyPx.wrist`, 'The same of a wrist'),
  field(
    `${clip}.timesUs[]`,
    'Presentation time of every frame, microseconds, so that all figures can be computed again',
  ),
  field(
    `${clip}.jointUncertaintyOwn`,
    'Whether that was found by marking again, by whoever placed most of the marks',
  ),
  field(`${stroke}.id`, 'The stroke'),
  field(`${stroke}.arm`, 'left or right'),
  field(`${stroke}.entry`, 'Frame of the entry'),
  field(`${stroke}.catch`, 'Frame of the catch'),
  field(`${stroke}.exit`, 'Frame of the exit'),
  field(`${stroke}.nextEntry`, 'Frame of the next entry of the same hand, or null'),
  ...['entry', 'catch', 'exit', 'nextEntry'].map((event) =>
    field(`${stroke}.${event}Source`, 'hand-seen, or wrist-proxy where the wrist stands in for the hand'),
  ),
  field(`${stroke}.breath`, 'Whether the swimmer breathes in this stroke'),
  field(`${stroke}.figures.*.value`, `By measure: ${figureMeaning}; null where there is none`),
  field(`${stroke}.figures.*.uncertainty`, 'Standard uncertainty in the unit of the value'),
  field(`${stroke}.figures.*.frame`, 'The frame to look at it'),
  field(`${stroke}.figures.*.reason`, 'Code that says why there is no value, or null'),
  field(`${mark}.arm`, 'left or right'),
  field(`${mark}.frame`, 'Index of the frame'),
  ...['shoulder', 'elbow', 'wrist'].flatMap((joint) => [
    field(`${mark}.${joint}.x`, 'Pixels from the left edge of the picture as shown'),
    field(`${mark}.${joint}.y`, 'Pixels down from the top edge'),
  ]),
  field(`${mark}.angles.forearmDeg`, 'Forearm against the plumb, degrees'),
  field(`${mark}.angles.upperArmDeg`, 'Upper arm against the plumb, degrees'),
  field(`${mark}.angles.elbowDeg`, 'Interior angle at the elbow, degrees'),
  field(`${mark}.angles.elbowDropDeg`, 'Elbow drop, degrees'),
  ...['forearmDeg', 'upperArmDeg', 'elbowDeg', 'elbowDropDeg'].map((angle) =>
    field(`${mark}.uncertaintyDeg.${angle}`, 'Its standard uncertainty, degrees'),
  ),
  field(`${mark}.plumbAssumed`, 'Whether the vertical of the picture stands in for a plumb'),
  field(`${row}.split`, 'all, breathing or not_breathing'),
  field(`${row}.measure`, 'Measure by its name'),
  field(`${row}.unit`, 'share, deg, per_min, m or m2_per_s'),
  ...['left', 'right'].flatMap((side) => [
    field(`${row}.${side}.count`, `Strokes of the ${side} arm`),
    field(`${row}.${side}.mean`, 'Their mean'),
    field(`${row}.${side}.low`, 'Lower end of its 95 % interval'),
    field(`${row}.${side}.high`, 'Upper end'),
  ]),
  field(`${row}.difference`, 'Right minus left'),
  field(`${row}.low`, 'Lower end of its 95 % interval'),
  field(`${row}.high`, 'Upper end'),
  field(`${row}.verdict`, 'What can be said of it'),
  field(`${row}.moreStrokes`, 'About how many more strokes a side would settle it, or null'),
  field(`${breath}.arm`, 'left, right, or together'),
  field(`${breath}.measure`, 'Measure by its name'),
  field(`${breath}.unit`, 'share, deg, per_min, m or m2_per_s'),
  ...['breathing', 'others'].flatMap((group) => [
    field(
      `${breath}.${group}.count`,
      group === 'others' ? 'Strokes without a breath' : 'Strokes with a breath',
    ),
    field(`${breath}.${group}.mean`, 'Their mean'),
    field(`${breath}.${group}.low`, 'Lower end of its 95 % interval'),
    field(`${breath}.${group}.high`, 'Upper end'),
  ]),
  field(`${breath}.difference`, 'Breathing minus others'),
  field(`${breath}.low`, 'Lower end of its 95 % interval'),
  field(`${breath}.high`, 'Upper end'),
  field(`${breath}.verdict`, 'What can be said of it'),
  field(`${breath}.moreStrokes`, 'About how many more strokes would settle it, or null'),
  field('trend[].measure', 'Measure by its name; the trend is filled for an athlete'),
  field('trend[].unit', 'share, deg, per_min, m or m2_per_s'),
  field('trend[].view', 'Camera view that is followed'),
  field('trend[].arm', 'left or right; both for the index of coordination'),
  field('trend[].points[].sessionId', 'The session'),
  field('trend[].points[].date', 'Its date'),
  field('trend[].points[].mean', 'Mean of its strokes'),
  field('trend[].points[].uncertainty', 'Standard uncertainty of the mean'),
  field('trend[].points[].count', 'Strokes that went in'),
  field('trend[].change', 'Last minus first session'),
  field('trend[].low', 'Lower end of its 95 % interval'),
  field('trend[].high', 'Upper end'),
  field('trend[].detectable', 'Smallest change that marking could not produce, 95 %'),
  field('trend[].verdict', 'What can be said of it'),
  field('trend[].slope.value', 'Change in 30 days along a straight line; slope is null below four sessions'),
  field('trend[].slope.low', 'Lower end of its 95 % interval'),
  field('trend[].slope.high', 'Upper end'),
  field('trend[].slope.robust', 'Median of the slopes between all pairs of sessions'),
];
