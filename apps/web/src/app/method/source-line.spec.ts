import { shortAuthors } from './source-line';

describe('authors in short', () => {
  it('names one, two, or the first of many', () => {
    expect(shortAuthors('Weir JP')).toBe('Weir');
    expect(shortAuthors('Craig AB Jr, Pendergast DR')).toBe('Craig and Pendergast');
    expect(shortAuthors('Chollet D, Chalies S, Chatard JC')).toBe('Chollet and others');
    expect(shortAuthors('JCGM')).toBe('JCGM');
  });
});
