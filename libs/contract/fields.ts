import * as z from 'zod';

/** Field schemas that several resources share: identifiers, names, dates, frames, pages of a list. */

export const idSchema = z.uuid();
export const idParams = z.strictObject({ id: idSchema });

export const nameSchema = z
  .string()
  .trim()
  .min(1, 'Give a name.')
  .max(120, 'Keep the name under 120 characters.');
export const noteSchema = z.string().trim().max(2000, 'Keep the note under 2000 characters.');
/** Lower case, since one person has one address however it is typed. */
export const emailSchema = z
  .string()
  .trim()
  .max(254)
  .transform((text) => text.toLowerCase())
  .pipe(z.email('Give an e-mail address such as name@club.example.'));

/** Calendar date `YYYY-MM-DD`. */
export const dateSchema = z.iso.date('Give the date as YYYY-MM-DD.');
/** ISO 8601 instant, UTC. */
export const instantSchema = z.iso.datetime();

/** 0-based index in presentation order. */
export const frameSchema = z.int().min(0).max(10_000_000);

export const pageQuery = {
  cursor: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
};

/** `{items, nextCursor, total}`: `nextCursor` is null on the last page, `total` counts all that the filter matches. */
export function pageOf<T extends z.ZodType>(item: T) {
  return z.strictObject({ items: z.array(item), nextCursor: z.string().nullable(), total: z.int().min(0) });
}
