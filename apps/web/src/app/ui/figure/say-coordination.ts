import type { CoordinationMode } from '@stillstroke/contract/coordination';
import { formatFigure, formatUncertainty } from './format-figure';

interface Coordinated {
  /** Share of the mean cycle. */
  readonly value: number;
  readonly uncertainty: number;
  readonly mode: CoordinationMode;
  /** Passages arm – other arm – arm. */
  readonly count: number;
}

const headlines: Readonly<Record<CoordinationMode, string>> = {
  'catch-up': 'Catch-up: a gap between the pulls of the two arms',
  opposition: 'Opposition: one arm begins to pull as the other ends',
  superposition: 'Superposition: the pulls of the two arms overlap',
  undetermined: 'Undetermined: a gap and an overlap cannot be told apart',
};

/** What both arms do together, and how sure it is; null: there is no passage to read it from. */
export function sayCoordination(read: Coordinated | null): {
  readonly headline: string;
  readonly detail: string;
} {
  if (!read) {
    return {
      headline: 'Not measured',
      detail:
        'The index of coordination needs a stroke of one arm, one of the other and the next of the first, in a row.',
    };
  }
  const figure = `${formatFigure(read.value, 'share', read.uncertainty, true)} ${formatUncertainty(read.uncertainty, 'share')}`;
  const over = `over ${read.count} ${read.count === 1 ? 'passage' : 'passages'}`;
  return {
    headline: headlines[read.mode],
    detail:
      `Index of coordination ${figure} of the cycle, ${over} from arm to arm. ` +
      'A higher index is not better in itself; it goes with pace.',
  };
}
