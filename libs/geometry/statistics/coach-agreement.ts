import { type Outcome, ok, refused } from '../outcome';
import { wrapDegrees } from '../units/angle';
import { type Agreement, agreement, type AgreementReason } from './agreement';

/** The same angle of the same arm on the same frame as two people marked it, degrees, with what marking leaves open. */
export interface ReadByTwo {
  readonly first: number;
  readonly second: number;
  readonly firstUncertainty: number;
  readonly secondUncertainty: number;
}

/**
 * `no-shift`: nothing shows that one reads more than the other. `small`: one does, by no more than the placing of two
 * marks leaves open. `large`: by more than that.
 */
export type AgreementVerdict = 'no-shift' | 'small' | 'large';

/** Agreement of two people on one angle. Differences are first − second. */
export interface CoachAgreement extends Agreement {
  /** Where each frame stands: mean of the two against their difference. */
  readonly points: readonly { readonly mean: number; readonly difference: number }[];
  /** Standard deviation of a difference that the two people's own spreads would leave: √ mean(u₁² + u₂²). */
  readonly marking: number;
  readonly verdict: AgreementVerdict;
}

/** Bland and Altman (1986) on angles: differences go the shorter way round. */
export function coachAgreement(readings: readonly ReadByTwo[]): Outcome<CoachAgreement, AgreementReason> {
  const differences = readings.map(({ first, second }) => wrapDegrees(first - second));
  const found = agreement(
    differences,
    differences.map(() => 0),
  );
  if (!found.ok) return found;
  const variances = readings.map((each) => each.firstUncertainty ** 2 + each.secondUncertainty ** 2);
  const marking = Math.sqrt(variances.reduce((sum, each) => sum + each, 0) / variances.length);
  if (!Number.isFinite(marking)) return refused('not-finite');
  const { bias, biasInterval } = found.value;
  const points = readings.map(({ second }, at) => {
    const difference = differences[at] ?? 0;
    return { mean: second + difference / 2, difference };
  });
  const shifted = biasInterval.low > 0 || biasInterval.high < 0;
  const verdict = !shifted ? 'no-shift' : Math.abs(bias) <= marking ? 'small' : 'large';
  return ok({ ...found.value, points, marking, verdict });
}
