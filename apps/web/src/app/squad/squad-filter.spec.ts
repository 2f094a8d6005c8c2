import { change, readFilter, sayRange, toAddress, toQuery } from './squad-filter';

describe('the squad page in the address', () => {
  it('leaves out what is as usual', () => {
    expect(Object.values(toAddress(readFilter({}))).every((value) => value === null)).toBe(true);
  });

  it('comes back as it went in', () => {
    const filter = {
      squadId: 's1',
      search: 'ines',
      sort: 'clipsToMark',
      direction: 'desc',
      withDeactivated: true,
      after: 'c25',
      from: 25,
    } as const;
    const address = Object.fromEntries(
      Object.entries(toAddress(filter)).map(([key, value]) => [
        key,
        value === null ? undefined : String(value),
      ]),
    );
    expect(readFilter(address)).toEqual(filter);
  });

  it('takes nonsense as not said', () => {
    const filter = readFilter({
      sort: 'shoeSize',
      direction: 'up',
      from: '-3',
      after: 'x',
      deactivated: '1',
    });
    expect(filter).toMatchObject({ sort: 'name', direction: 'asc', from: 0, withDeactivated: false });
  });

  it('starts at the first page when something else is listed', () => {
    const second = readFilter({ after: 'c25', from: '25' });
    expect(change(second, { search: 'rho' })).toMatchObject({ after: null, from: 0, search: 'rho' });
    expect(change(second, { after: 'c50', from: 50 })).toMatchObject({ after: 'c50', from: 50 });
  });

  it('asks the server for sorting, filtering and paging', () => {
    expect(toQuery(readFilter({ squad: 's1', sort: 'lastSession', direction: 'desc', after: 'c' }))).toEqual({
      squadId: 's1',
      search: '',
      sort: 'lastSession',
      direction: 'desc',
      includeDeactivated: 'false',
      cursor: 'c',
      limit: 25,
    });
  });
});

describe('sayRange', () => {
  it('says which rows of how many', () => {
    expect(sayRange(0, 5, 5)).toBe('5 in all');
    expect(sayRange(25, 25, 61)).toBe('26–50 of 61');
    expect(sayRange(0, 0, 0)).toBe('none');
  });
});
