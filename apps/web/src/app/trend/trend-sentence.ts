import type { Trend } from '@stillstroke/contract/trend';
import { formatDifference } from '../ui/figure/format-figure';
import { sayMoved } from '../ui/figure/measure-words';

type ArmTrend = Trend['arms'][number];

/** Right arm first when only it moved; each arm in its own sentence. */
export function sayTrend(trend: Trend): string {
  const sentences = [...trend.arms]
    .sort((a, b) => Number(b.verdict === 'changed') - Number(a.verdict === 'changed'))
    .map((arm) => sayArm(arm, trend));
  return sentences.length > 0 ? sentences.join(' ') : 'No session with this measure yet.';
}

function sayArm(arm: ArmTrend, { measure, unit }: Trend): string {
  const name = names[arm.arm];
  const first = arm.points[0];
  if (!first) return `${name} not measured.`;
  if (arm.change === null) return `${name} measured in one session so far.`;
  if (arm.verdict === 'too-few') return `${name} measured on too few strokes to say whether it moved.`;
  if (arm.verdict !== 'changed') {
    const amount = formatDifference(arm.change, unit);
    return `${name} ${amount} from the first session: ${notMoreThan[arm.verdict]}.`;
  }
  return `${name} ${sayMoved(measure, arm.change)} since ${monthOf(first.date)}: more than marking could produce.`;
}

const names = { left: 'Left arm', right: 'Right arm', both: 'Both arms' } as const;

const notMoreThan = {
  'not-more-than-marking': 'not more than marking could produce',
  'not-more-than-strokes-vary': 'not more than strokes of one session differ among themselves',
};

/** `July`, from a calendar date; the time zone must not move it. */
function monthOf(date: string): string {
  return new Date(`${date}T12:00:00Z`).toLocaleDateString('en-GB', { month: 'long', timeZone: 'UTC' });
}
