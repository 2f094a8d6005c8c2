import { angleEntries } from './angle-entries';
import { measureEntries } from './measure-entries';
import type { EntryKind, MethodEntry } from './method-entry';
import { statisticEntries } from './statistic-entries';

/** Every figure the product shows, by the name under which pages know it. Explain and the method page read this alone. */
export const catalogue = { ...angleEntries, ...measureEntries, ...statisticEntries };

export type EntryId = keyof typeof catalogue;

const byId: Readonly<Record<string, MethodEntry | undefined>> = catalogue;

/** The entry of a figure; undefined for a name that has none. */
export function entryOf(id: string): MethodEntry | undefined {
  return byId[id];
}

export interface NamedEntry {
  readonly id: string;
  readonly entry: MethodEntry;
}

/** Entries of one kind, in the order they are written in. */
export function entriesOf(kind: EntryKind): readonly NamedEntry[] {
  return Object.entries(byId).flatMap(([id, entry]) => (entry?.kind === kind ? [{ id, entry }] : []));
}
