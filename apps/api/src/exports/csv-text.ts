import type { Table } from '@stillstroke/contract/export-dictionary';
import { stringify } from 'csv-stringify/sync';

export type Cell = string | number | boolean | null;
/** Cells by column name. */
export type Row = Readonly<Record<string, Cell>>;

/** What a spreadsheet takes for the beginning of a formula, the wide forms of East Asian scripts included. */
const formulaStart = /^[=+\-@\t\r\n＝＋－＠]/;

/**
 * Words of people that would run as a formula get an apostrophe in front, as spreadsheets themselves write text. Numbers
 * are told by the kind of their column, never by their looks, and stay as they are.
 */
export function harmless(words: string): string {
  return formulaStart.test(words) ? `'${words}` : words;
}

/** The row of names of a table. */
export function csvHead({ columns }: Table): string {
  return asCsv([columns.map(({ name }) => name)]);
}

/** @throws Error when a row lacks a column of the table or has one that is not in it */
export function csvRows(table: Table, rows: readonly Row[]): string {
  return asCsv(rows.map((row) => cellsOf(table, row)));
}

function cellsOf({ file, columns }: Table, row: Row): string[] {
  if (Object.keys(row).length !== columns.length) throw new Error(`${file}: a row has other columns`);
  return columns.map(({ name, kind }) => {
    const cell = row[name];
    if (cell === undefined) throw new Error(`${file}: a row has no ${name}`);
    if (cell === null) return '';
    switch (kind) {
      case 'number':
      case 'whole':
        if (typeof cell !== 'number' || !Number.isFinite(cell))
          throw new Error(`${file}: ${name} is no number`);
        return String(cell);
      case 'yes-no':
        return cell === true ? 'yes' : 'no';
      default:
        return harmless(String(cell));
    }
  });
}

function asCsv(rows: readonly (readonly string[])[]): string {
  return stringify(rows as string[][], { record_delimiter: '\r\n' });
}
