import type { listAthletes } from '@stillstroke/contract/athletes';
import type { QueryInputOf } from '@stillstroke/contract/endpoint';

type Query = NonNullable<QueryInputOf<typeof listAthletes>>;
export type SquadSort = NonNullable<Query['sort']>;

export const rowsOnPage = 25;

/** What the squad page shows, as it stands in the address; everything that is as usual is left out there. */
export interface SquadFilter {
  readonly squadId: string | null;
  readonly search: string;
  readonly sort: SquadSort;
  readonly direction: 'asc' | 'desc';
  readonly withDeactivated: boolean;
  /** Cursor of the page shown; null = the first. */
  readonly after: string | null;
  /** How many rows lie before this page. */
  readonly from: number;
}

export type AddressValues = Readonly<Record<string, string | undefined>>;

const sorts: readonly SquadSort[] = ['name', 'lastSession', 'clipsToMark'];

/** Reads the address; anything that makes no sense there is taken as not said. */
export function readFilter(values: AddressValues): SquadFilter {
  const sort = sorts.find((each) => each === values['sort']) ?? 'name';
  const after = values['after'] || null;
  const from = Number.parseInt(values['from'] ?? '', 10);
  return {
    squadId: values['squad'] || null,
    search: values['search'] ?? '',
    sort,
    direction: values['direction'] === 'desc' ? 'desc' : 'asc',
    withDeactivated: values['deactivated'] === 'shown',
    after,
    from: after && from > 0 ? from : 0,
  };
}

/** The filter as query parameters of the page; null takes a parameter out of the address. */
export function toAddress(filter: SquadFilter): Record<string, string | number | null> {
  return {
    squad: filter.squadId,
    search: filter.search || null,
    sort: filter.sort === 'name' ? null : filter.sort,
    direction: filter.direction === 'asc' ? null : filter.direction,
    deactivated: filter.withDeactivated ? 'shown' : null,
    after: filter.after,
    from: filter.after ? filter.from : null,
  };
}

/** A change of what is listed; it starts again at the first page unless it says where to go. */
export function change(filter: SquadFilter, what: Partial<SquadFilter>): SquadFilter {
  return { ...filter, after: null, from: 0, ...what };
}

/** The filter as the server reads it. */
export function toQuery(filter: SquadFilter) {
  return {
    squadId: filter.squadId,
    search: filter.search,
    sort: filter.sort,
    direction: filter.direction,
    includeDeactivated: String(filter.withDeactivated),
    cursor: filter.after,
    limit: rowsOnPage,
  };
}

/** `26–50 of 61`, or `none`. */
export function sayRange(from: number, shown: number, total: number): string {
  if (total === 0 || shown === 0) return 'none';
  return from === 0 && shown === total ? `${total} in all` : `${from + 1}–${from + shown} of ${total}`;
}
