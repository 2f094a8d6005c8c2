import type { ReadingSource } from '@stillstroke/contract/review-readings';
import type { Finding, FindingArm, FindingKind, FindingPhase } from '@stillstroke/contract/reviews';

/** What a writer changes of a finding by typing and choosing. */
export interface FindingFields {
  readonly kind: FindingKind;
  readonly words: string;
  readonly arm: FindingArm;
  readonly phase: FindingPhase;
  readonly observationId: string | null;
  readonly readings: readonly ReadingSource[];
}
export type FieldName = keyof FindingFields;

export function fieldsOf({ kind, words, arm, phase, observation, readings }: Finding): FindingFields {
  return {
    kind,
    words,
    arm,
    phase,
    observationId: observation?.id ?? null,
    readings: readings.map(({ source }) => source),
  };
}

/** The names of the fields that are there. */
export function namesOf(fields: Partial<FindingFields>): FieldName[] {
  return (Object.keys(fields) as FieldName[]).filter((name) => fields[name] !== undefined);
}

export function sameField(name: FieldName, a: Partial<FindingFields>, b: Partial<FindingFields>): boolean {
  return name === 'readings'
    ? JSON.stringify(a.readings) === JSON.stringify(b.readings)
    : a[name] === b[name];
}

/** Only the fields whose names are given. */
export function only(fields: FindingFields, names: readonly FieldName[]): Partial<FindingFields> {
  return Object.fromEntries(names.map((name) => [name, fields[name]]));
}
