import type { Coordination } from '@stillstroke/contract/coordination';
import type { Explanation } from '../ui/explain/explanation';
import { sayAlone } from '../ui/explain/part-words';
import { formatFigure, formatRange, formatUncertainty } from '../ui/figure/format-figure';

/** The index of coordination over the passages of a session, opened up; null where there is none. */
export function explainCoordination(said: Coordination): Explanation | null {
  const { value, uncertainty, interval, mode, passages } = said;
  if (value === null || uncertainty === null || mode === null) return null;
  const squares = passages.reduce((sum, passage) => sum + passage.uncertainty ** 2, 0);
  return {
    entry: 'idc',
    of: `Both arms, ${passages.length === 1 ? 'one passage' : `${passages.length} passages`}`,
    result: `${formatFigure(value, 'share', uncertainty, true)} ${formatUncertainty(uncertainty, 'share')}, ${mode}`,
    interval: interval && formatRange(interval, 'share'),
    inputs: passages.map((passage) => ({
      name: `Passage from frame ${passage.frame}${passage.breath ? ', with a breath' : ''}`,
      value: `${formatFigure(passage.value, 'share', passage.uncertainty, true)} ${formatUncertainty(passage.uncertainty, 'share')}`,
    })),
    frames: passages.map(({ clipId, frame }) => ({ clipId, frame, arm: null, says: `Frame ${frame}, exit` })),
    // Passages share no event, so that each brings its own part to the mean.
    parts: [...passages]
      .sort((a, b) => b.uncertainty - a.uncertainty)
      .map((passage) => ({
        name: `choosing the events of the passage from frame ${passage.frame}`,
        alone: sayAlone(passage.uncertainty / passages.length, 'share'),
        share: squares > 0 ? passage.uncertainty ** 2 / squares : 0,
      })),
    partsOf: 'its ±',
    also: ['uncertainty'],
  };
}
