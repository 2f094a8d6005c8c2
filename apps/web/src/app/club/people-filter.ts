import type { Person } from '@stillstroke/contract/people';
import { roleSchema, type Role } from '@stillstroke/contract/roles';
import type { Squad } from '@stillstroke/contract/squads';

export type PeopleSort = 'name' | 'role' | 'status';

export const peopleOnPage = 25;
export const roles = roleSchema.options;
export const roleWords: Readonly<Record<Role, string>> = {
  admin: 'Admin',
  coach: 'Coach',
  athlete: 'Athlete',
  guardian: 'Guardian',
};
export const statusWords: Readonly<Record<Person['status'], string>> = {
  invited: 'invited, no password yet',
  active: 'active',
  deactivated: 'deactivated',
};

/** Who is listed, as it stands in the address. */
export interface PeopleFilter {
  readonly search: string;
  readonly role: Role | null;
  readonly sort: PeopleSort;
  readonly direction: 'asc' | 'desc';
  /** Cursor of the page shown; null = the first. */
  readonly after: string | null;
}

/** Reads the address; anything that makes no sense there is taken as not said. */
export function readPeopleFilter(values: Readonly<Record<string, string | undefined>>): PeopleFilter {
  return {
    search: values['search'] ?? '',
    role: roleSchema.safeParse(values['role']).data ?? null,
    sort: (['role', 'status'] as const).find((each) => each === values['sort']) ?? 'name',
    direction: values['direction'] === 'desc' ? 'desc' : 'asc',
    after: values['after'] || null,
  };
}

export function toPeopleAddress(filter: PeopleFilter): Record<string, string | null> {
  return {
    search: filter.search || null,
    role: filter.role,
    sort: filter.sort === 'name' ? null : filter.sort,
    direction: filter.direction === 'asc' ? null : filter.direction,
    after: filter.after,
  };
}

/** Names of a person's squads; those that have gone are left out. */
export function saySquads(person: Pick<Person, 'squadIds'>, squads: readonly Squad[]): string {
  return person.squadIds.flatMap((id) => squads.find((squad) => squad.id === id)?.name ?? []).join(', ');
}
