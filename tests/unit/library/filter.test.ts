import { describe, expect, it } from 'vitest';
import { hrefOf, isNarrowed, sortHref } from '@/app/(app)/library/address';
import { filterOf, parseLibraryQuery } from '@/app/(app)/library/filter';

const EMPTY = parseLibraryQuery({});

describe('parseLibraryQuery', () => {
  it('reads an address', () => {
    const view = parseLibraryQuery({ q: ' aubade ', key: '-3:major', diminished: '1', sort: 'title', page: '2' });
    expect(filterOf(view)).toMatchObject({
      words: 'aubade',
      key: { tonicFifths: -3, mode: 'major' },
      secondaryDiminished: true,
      sort: 'title',
      descending: false,
      page: 2,
    });
  });

  it('leaves aside what it cannot read, empty facets and repeated ones', () => {
    expect(parseLibraryQuery({ state: 'lost', by: 'me', page: '-1', sort: 'size', composer: '', key: ['0:major', '1:minor'] })).toEqual(EMPTY);
    expect(filterOf(parseLibraryQuery({ key: '3:dorian' })).key).toBeNull();
  });

  it('shows the newest first unless told otherwise', () => {
    expect(filterOf(EMPTY)).toMatchObject({ sort: 'added', descending: true });
    expect(isNarrowed(EMPTY)).toBe(false);
  });
});

describe('hrefOf', () => {
  it('writes what parseLibraryQuery reads, and leaves defaults out', () => {
    expect(hrefOf(EMPTY, {})).toBe('/library');
    const view = parseLibraryQuery({ q: 'a&b', composer: 'Verrin', state: 'uncut', page: '3' });
    const params = Object.fromEntries(new URL(hrefOf(view, { page: 3 }), 'http://x').searchParams);
    expect(parseLibraryQuery(params)).toEqual(view);
  });

  it('goes back to the first page when anything else changes', () => {
    expect(hrefOf({ ...EMPTY, page: 3 }, { composer: 'Verrin' })).toBe('/library?composer=Verrin');
  });
});

describe('sortHref', () => {
  it('sorts by the column, then turns it round', () => {
    expect(sortHref(EMPTY, 'title')).toBe('/library?sort=title');
    expect(sortHref({ ...EMPTY, sort: 'title' }, 'title')).toBe('/library?sort=title&order=down');
    expect(sortHref(EMPTY, 'added')).toBe('/library?order=up');
  });
});
