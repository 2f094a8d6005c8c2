import { strokeKindSchema, travelSchema, viewSchema, type Clip } from '@stillstroke/contract/clip-facts';
import { uploadFieldsSchema, type UploadFields } from '@stillstroke/contract/clips';

/** What a coach says about a film: how it was taken and what it shows. */
export type FilmFields = UploadFields;

export const views = viewSchema.options;
export const travels = travelSchema.options;
export const strokeKinds = strokeKindSchema.options;

/** Choices of how much slower a film plays than it was; the factor is world seconds per file second. */
export const captureRateFactors: readonly number[] = [1, 1 / 2, 1 / 4, 1 / 5, 1 / 8, 1 / 10, 1 / 16];

/**
 * What is assumed of the next film: as the newest clip of this session, else as last said on this device, else the
 * ordinary case.
 */
export function usualFields(clips: readonly Clip[], remembered: unknown): FilmFields {
  const newest = [...clips].sort((a, b) => b.createdAt.localeCompare(a.createdAt))[0];
  if (newest) {
    const { view, travel, stroke, captureRateFactor } = newest;
    return { view, travel, stroke, captureRateFactor };
  }
  const stored = uploadFieldsSchema.safeParse(remembered);
  return stored.success ? stored.data : uploadFieldsSchema.parse({});
}

/** Fields whose value differs from what the server has. */
export function changedFields(has: FilmFields, wanted: FilmFields): Partial<FilmFields> {
  return Object.fromEntries(
    Object.entries(wanted).filter(([name, value]) => has[name as keyof FilmFields] !== value),
  );
}
