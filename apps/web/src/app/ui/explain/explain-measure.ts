import type { StrokeExplanation } from '@stillstroke/contract/explanation';
import { fixed, formatFigure, formatRange, formatUncertainty } from '../figure/format-figure';
import { sayReason } from '../figure/reason-words';
import type { ExplainedFrame, ExplainedInput, Explanation } from './explanation';
import { sayParts } from './part-words';
import { sayClip, sayMarks } from './say-inputs';

const eventWords = { entry: 'Entry', catch: 'Catch', exit: 'Exit', nextEntry: 'Next entry' } as const;

/** One figure of one stroke, opened up: on the Desk from its own readings, elsewhere from the server’s answer. */
export function explainMeasure(said: StrokeExplanation): Explanation {
  const { measure, unit, figure, interval, arm, breath } = said;
  return {
    entry: measure,
    of: `${arm === 'left' ? 'Left' : 'Right'} arm, one ${breath ? 'breathing ' : ''}stroke`,
    result:
      figure.value === null
        ? `No figure: ${sayReason(figure.reason)}`
        : `${formatFigure(figure.value, unit, figure.uncertainty)} ${formatUncertainty(figure.uncertainty ?? 0, unit)}`,
    interval: interval && formatRange(interval, unit),
    inputs: inputsOf(said),
    frames: figure.frames.map((frame) => placeOf(said, frame)),
    parts: sayParts(said.parts, unit),
    partsOf: 'its ±',
    also: ['uncertainty', 'projected'],
  };
}

function inputsOf(said: StrokeExplanation): ExplainedInput[] {
  const { events, measure, marks } = said;
  const timed = measure !== 'peakDrop' && measure !== 'elbowAtMidPull';
  return [
    ...events.map(({ event, frame, timeUs }) => ({
      name: eventWords[event],
      value: `frame ${frame}${timeUs === null ? '' : `, at ${fixed(timeUs / 1e6, 3)} s of the file`}`,
    })),
    ...(timed
      ? [
          {
            name: 'An event lies within',
            value: `${said.eventErrorFrames} frame to either side of its frame`,
          },
        ]
      : []),
    ...(measure === 'verticalAt'
      ? [{ name: 'Tolerance of vertical', value: `${fixed(said.verticalToleranceDeg, 0)}°` }]
      : []),
    ...(measure === 'strokeRate'
      ? [{ name: 'Capture rate factor', value: `${said.captureRateFactor} world seconds per file second` }]
      : []),
    ...(marks.length > 0 ? [...sayMarks(marks), ...sayClip(said)] : []),
  ];
}

function placeOf({ clipId, arm, events, figure }: StrokeExplanation, frame: number): ExplainedFrame {
  const event = events.find((each) => each.frame === frame);
  const what = event ? `, ${eventWords[event.event].toLowerCase()}` : '';
  const shown = frame === figure.frame && !event ? ', the frame shown for it' : '';
  return { clipId, arm, frame, says: `Frame ${frame}${what}${shown}` };
}
