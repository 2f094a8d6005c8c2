import { idSchema } from '@stillstroke/contract/fields';
import { sql, type AnyColumn, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { HttpProblem } from './problem';

/**
 * Where a page of a sorted list ended: the order it was asked in, the sort value of the last row, and its name and id,
 * which break ties. Opaque to callers.
 */
const placeSchema = z.strictObject({
  order: z.string().max(40),
  value: z.union([z.string().max(200), z.number()]),
  name: z.string().max(200),
  id: idSchema,
});
export type Place = z.infer<typeof placeSchema>;

export const writeCursor = (place: Place): string => Buffer.from(JSON.stringify(place)).toString('base64url');

/** @throws HttpProblem bad-request when the list did not give this cursor out, or gave it out for another order */
export function readCursor(cursor: string, order: string): Place {
  let read: unknown;
  try {
    read = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    read = undefined;
  }
  const place = placeSchema.safeParse(read);
  if (place.success && place.data.order === order) return place.data;
  throw new HttpProblem(
    400,
    'bad-request',
    'The cursor is not one that this list gave out in this order; start from the first page.',
  );
}

type Expression = SQL | SQL.Aliased | AnyColumn;

/** Rows behind the place, where rows are ordered by `value` in the direction given, then by name and id ascending. */
export function behind(
  place: Place,
  direction: 'asc' | 'desc',
  { value, name, id }: { value: Expression; name: Expression; id: Expression },
): SQL {
  const further = direction === 'asc' ? sql`${value} > ${place.value}` : sql`${value} < ${place.value}`;
  return sql`(${further} or (${value} = ${place.value} and (${name}, ${id}) > (${place.name}, ${place.id})))`;
}
