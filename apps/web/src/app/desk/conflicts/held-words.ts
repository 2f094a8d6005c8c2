import { sourceOf } from '@stillstroke/geometry/events/event-moment';
import { formatFigure } from '../../ui/figure/format-figure';
import type { Held } from '../saving/outbox';
import type { Wanted } from '../saving/pending-change';
import type { ClipFacts } from '../state/desk-change';
import { eventsInOrder, eventWords } from '../state/desk-stroke';
import type { DeskState } from '../state/desk-state';
import { viewWords } from '../clip-words';

/** What a held change is about: `Left arm on frame 168`. */
export function nameHeld({ change: { wanted } }: Held, state: DeskState): string {
  switch (wanted.kind) {
    case 'mark':
      return `${wanted.arm === 'left' ? 'Left' : 'Right'} arm on frame ${wanted.frame}`;
    case 'stroke': {
      const stroke = wanted.stroke ?? state.strokes().find(({ id }) => id === wanted.id);
      return stroke
        ? `${stroke.arm === 'left' ? 'Left' : 'Right'} stroke from frame ${stroke.entry}`
        : 'A stroke';
    }
    case 'plumb':
      return 'The plumb';
    case 'scale':
      return 'The scale';
    case 'distance':
      return 'The known distance';
    case 'facts':
      return 'The set-up';
  }
}

/** One version in a line: a mark by its angles, a stroke by its frames. */
export function sayVersion(wanted: Wanted, state: DeskState): string {
  switch (wanted.kind) {
    case 'mark':
      return sayMark(wanted, state);
    case 'stroke': {
      const { stroke } = wanted;
      if (!stroke) return 'removed';
      const set = eventsInOrder.filter((event) => stroke[event] !== null);
      const events = set
        .map(
          (event) =>
            `${eventWords[event]} ${stroke[event]}${sourceOf(stroke, event) === 'wrist-proxy' ? ' by the wrist' : ''}`,
        )
        .join(', ');
      return `${events}${stroke.breath ? ', breathing' : ''}`;
    }
    case 'plumb':
      return wanted.plumb ? 'drawn' : 'taken away';
    case 'scale':
      return sayScale(wanted.scale);
    case 'distance':
      return wanted.distance ? `${wanted.distance.metres} m` : 'taken away';
    case 'facts':
      return Object.entries(wanted.facts)
        .map(([name, value]) => sayFact(name as keyof ClipFacts, value))
        .join(', ');
  }
}

/** The frame that shows what it is about; null where that is the whole clip. */
export function frameOfHeld({ change: { wanted } }: Held): number | null {
  if (wanted.kind === 'mark') return wanted.frame;
  return wanted.kind === 'stroke' ? (wanted.stroke?.entry ?? null) : null;
}

function sayScale(scale: Extract<Wanted, { kind: 'scale' }>['scale']): string {
  if (!scale) return 'taken away';
  return scale.kind === 'length'
    ? `a length of ${scale.metres} m`
    : `a rectangle of ${scale.widthM} by ${scale.heightM} m`;
}

function sayFact(name: keyof ClipFacts, value: ClipFacts[keyof ClipFacts]): string {
  if (name === 'view') return viewWords[value as ClipFacts['view']];
  return typeof value === 'object' ? sayFieldOfView(value) : String(value);
}

function sayFieldOfView(view: ClipFacts['fieldOfView']): string {
  return view ? `${view.deg}° across in ${view.medium}` : 'field of view not said';
}

function sayMark({ mark }: Extract<Wanted, { kind: 'mark' }>, state: DeskState): string {
  if (!mark) return 'removed';
  const reading = state.readings.read(mark);
  if (!reading.ok) return 'not complete';
  const { forearmDeg, elbowDeg } = reading.value.angles;
  return `forearm ${formatFigure(forearmDeg, 'deg', 0.5)}, elbow ${formatFigure(elbowDeg, 'deg', 0.5)}`;
}
