import { exportTables, type TableName } from '@stillstroke/contract/export-dictionary';
import { strToU8, Zip, ZipDeflate } from 'fflate';
import { csvHead, csvRows, type Row } from './csv-text';
import type { ExportParts } from './export-parts';
import { headRows, sessionRows, trendRows } from './table-rows';

/** Zip entries carry a date; always this one, so that the same data is the same file. Zip knows no earlier one. */
const noDate = new Date(1980, 0, 1);

const names = Object.keys(exportTables) as TableName[];

/**
 * The tables of an export in a zip, a session at a time. Tables behind the first wait packed until those before them are
 * done: a fraction of what they hold.
 */
export function* csvZipChunks({ head, sessions, trend }: ExportParts): Generator<Uint8Array> {
  const packed: Uint8Array[] = [];
  const zip = new Zip((error, chunk) => {
    if (error) throw error;
    packed.push(chunk);
  });
  const entries = new Map(names.map((name) => [name, entryOf(zip, name)]));
  const put = (rows: Partial<Record<TableName, readonly Row[]>>) => {
    for (const name of names) {
      const csv = csvRows(exportTables[name], rows[name] ?? []);
      if (csv) entries.get(name)?.push(strToU8(csv));
    }
  };
  put(headRows(head));
  yield* packed.splice(0);
  for (const session of sessions) {
    put(sessionRows(session));
    yield* packed.splice(0);
  }
  put(trendRows(trend()));
  for (const entry of entries.values()) entry.push(new Uint8Array(0), true);
  zip.end();
  yield* packed.splice(0);
}

function entryOf(zip: Zip, name: TableName): ZipDeflate {
  const entry = new ZipDeflate(exportTables[name].file, { level: 6 });
  entry.mtime = noDate;
  zip.add(entry);
  entry.push(strToU8(csvHead(exportTables[name])));
  return entry;
}
