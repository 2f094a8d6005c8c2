import { sql, type AnyColumn, type SQL } from 'drizzle-orm';

/** A name as it is sorted and searched: without accents and case, which SQLite by itself knows for ASCII only. */
export function fold(text: string): string {
  return text.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase();
}

/** The folded text of a column, for use in queries ({@link fold} is registered at every open database). */
export const folded = (column: AnyColumn): SQL<string> => sql<string>`fold(${column})`;

/** Whether the column contains the text, accents and case aside. */
export const foldedContains = (column: AnyColumn, text: string): SQL =>
  sql`instr(fold(${column}), ${fold(text)}) > 0`;
