import { readPeopleFilter, saySquads, toPeopleAddress } from './people-filter';

describe('the people list in the address', () => {
  it('comes back as it went in, and leaves out what is as usual', () => {
    const filter = { search: 'ow', role: 'coach', sort: 'status', direction: 'desc', after: 'c' } as const;
    expect(readPeopleFilter(toPeopleAddress(filter) as Record<string, string>)).toEqual(filter);
    expect(Object.values(toPeopleAddress(readPeopleFilter({})))).toEqual([null, null, null, null, null]);
  });

  it('takes nonsense as not said', () => {
    expect(readPeopleFilter({ role: 'captain', sort: 'age' })).toMatchObject({ role: null, sort: 'name' });
  });
});

describe('saySquads', () => {
  it('names the squads in the order given', () => {
    const squad = (id: string, name: string) => ({
      id,
      name,
      coaches: [],
      athleteCount: 0,
      deactivated: false,
    });
    expect(saySquads({ squadIds: ['b', 'gone', 'a'] }, [squad('a', 'Masters'), squad('b', 'Juniors')])).toBe(
      'Juniors, Masters',
    );
  });
});
