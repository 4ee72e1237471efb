import type { LibrarySort } from '@/db/queries/library';
import type { LibraryQuery } from './filter';

/** The newest comes first, and names in alphabetical order, unless the reader turns it round. */
export function isDescending(view: Pick<LibraryQuery, 'sort' | 'order'>): boolean {
  return view.order ? view.order === 'down' : view.sort === 'added';
}

/** True when anything but the order and the page narrows the view. */
export function isNarrowed(view: LibraryQuery): boolean {
  return view.q !== '' || [view.composer, view.key, view.state, view.by, view.diminished].some((facet) => facet !== null);
}

/** The address of the view with some of it changed; a change of anything but the page goes back to the first page. */
export function hrefOf(view: LibraryQuery, change: Partial<LibraryQuery>): string {
  const next = { ...view, page: 1, ...change };
  const params = new URLSearchParams();
  for (const [name, value] of Object.entries(next)) {
    if (value !== null && value !== '' && !isDefault(name, value)) params.set(name, String(value));
  }
  const text = params.toString();
  return text ? `/library?${text}` : '/library';
}

function isDefault(name: string, value: string | number): boolean {
  return (name === 'page' && value === 1) || (name === 'sort' && value === 'added');
}

/** Where a click on a column's head leads: the other way round when the view is sorted by it already. */
export function sortHref(view: LibraryQuery, sort: LibrarySort): string {
  if (view.sort !== sort) return hrefOf(view, { sort, order: null });
  return hrefOf(view, { sort, order: isDescending(view) ? 'up' : 'down' });
}
