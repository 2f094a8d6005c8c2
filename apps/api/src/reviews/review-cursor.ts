import { idSchema } from '@stillstroke/contract/fields';
import { z } from 'zod';
import { HttpProblem } from '../platform/problem';

/** Where a page of reviews ended: newest first. */
const placeSchema = z.tuple([z.string().max(40), idSchema]);

export function reviewCursor(place: z.infer<typeof placeSchema>): string {
  return Buffer.from(JSON.stringify(place)).toString('base64url');
}

/** @throws HttpProblem bad-request when the cursor is not one of ours */
export function readReviewCursor(cursor: string): z.infer<typeof placeSchema> {
  let read: unknown;
  try {
    read = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    read = undefined;
  }
  const place = placeSchema.safeParse(read);
  if (place.success) return place.data;
  throw new HttpProblem(
    400,
    'bad-request',
    'The cursor is not one that this list gave out; start from the first page.',
  );
}
