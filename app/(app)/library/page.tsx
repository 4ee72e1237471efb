import type { Metadata } from 'next';
import { EmptyState, Pagination } from '@/components/ui';
import { LIBRARY_PAGE_SIZE, type LibraryFacets, getLibraryFacets, listLibrary } from '@/db/queries/library';
import { findLastStatements } from '@/db/queries/scores';
import { canUseLibrary } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';
import { formatKeyForPeople } from '@/lib/theory/key';
import { fifths } from '@/lib/theory/pitch';
import { createDeps } from '@/lib/workflows/deps';
import { Filters } from './_components/filters';
import { LibraryTable } from './_components/library-table';
import { isInWork } from './_components/score-states';
import { UploadArea } from './_components/upload-area';
import { hrefOf, isNarrowed } from './address';
import { listExcerptEntries } from './entries';
import { type LibraryQuery, type SearchParams, filterOf, parseLibraryQuery } from './filter';

export const metadata: Metadata = { title: 'Library' };

export default async function LibraryPage({ searchParams }: { readonly searchParams: Promise<SearchParams> }) {
  const actor = await requireActor(canUseLibrary);
  const { db } = createDeps();
  const view = parseLibraryQuery(await searchParams);
  const [{ rows, total }, facets, lastStatements] = await Promise.all([
    listLibrary(db, actor, filterOf(view)),
    getLibraryFacets(db, actor),
    findLastStatements(db, actor),
  ]);
  const excerpts = await listExcerptEntries(db, actor, rows.map(({ id }) => id));
  return (
    <div className="sheet pb-16">
      <UploadArea lastStatements={lastStatements} inWork={rows.filter(({ state }) => isInWork(state)).map(({ id }) => id)}>
        {facets.total === 0 ? <EmptyLibrary /> : <LibraryFilters view={view} facets={facets} />}
        {facets.total > 0 && total === 0 ? <NothingFound /> : null}
        {total > 0 ? <LibraryTable view={view} rows={rows} excerpts={excerpts} total={total} of={facets.total} /> : null}
        <Pagination page={view.page} pageCount={Math.ceil(total / LIBRARY_PAGE_SIZE)} hrefOf={(page) => hrefOf(view, { page })} label="Pages of the library" />
      </UploadArea>
    </div>
  );
}

function LibraryFilters({ view, facets }: { readonly view: LibraryQuery; readonly facets: LibraryFacets }) {
  const keys = facets.keys.map(({ tonicFifths, mode }) => ({
    value: `${tonicFifths}:${mode}`,
    label: formatKeyForPeople({ tonic: fifths(tonicFifths), mode }),
  }));
  return (
    <Filters
      view={view}
      narrowed={isNarrowed(view)}
      composers={facets.composers.map(({ composer, n }) => ({ value: composer, label: `${composer} (${n})` }))}
      keys={keys}
      people={facets.uploaders.map(({ id, name, n }) => ({ value: id, label: `${name} (${n})` }))}
    />
  );
}

function EmptyLibrary() {
  return (
    <EmptyState title="No score yet">
      <p>
        Export a score as MusicXML from your notation program and drop it here. Understave reads it, you cut the bars you
        want to teach with, and it proposes a numeral for every chord, with its reasons.
      </p>
    </EmptyState>
  );
}

function NothingFound() {
  return (
    <EmptyState title="Nothing in the library answers to this">
      <p>Take away a word or a facet, or show the whole library.</p>
    </EmptyState>
  );
}
