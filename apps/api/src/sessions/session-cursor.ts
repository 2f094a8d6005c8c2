import { dateSchema, idSchema } from '@stillstroke/contract/fields';
import { z } from 'zod';
import { HttpProblem } from '../platform/problem';

/** Where a page of sessions ended: newest first by date, then by when it was entered. */
const placeSchema = z.tuple([dateSchema, z.string().max(40), idSchema]);
export type SessionPlace = z.infer<typeof placeSchema>;

export function sessionCursor(place: SessionPlace): string {
  return Buffer.from(JSON.stringify(place)).toString('base64url');
}

/** @throws HttpProblem bad-request when the cursor is not one of ours */
export function readSessionCursor(cursor: string): SessionPlace {
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
