import Link from 'next/link';
import { Row, SortTh, Table, Th } from '@/components/ui';
import type { LibraryRow, LibrarySort } from '@/db/queries/library';
import { isDescending, sortHref } from '../address';
import type { ExcerptEntry } from '../entries';
import type { LibraryQuery } from '../filter';
import { ScoreRows } from './score-rows';

interface LibraryTableProps {
  readonly view: LibraryQuery;
  readonly rows: readonly LibraryRow[];
  readonly excerpts: ReadonlyMap<string, readonly ExcerptEntry[]>;
  readonly total: number;
  readonly of: number;
}

export function LibraryTable({ view, rows, excerpts, total, of }: LibraryTableProps) {
  return (
    <>
      <p role="status" className="mb-1 text-small text-ink-soft tabular">
        {total === of ? (of === 1 ? '1 score' : `${of} scores`) : `${total} of ${of} scores`}
      </p>
      <Table caption="Scores and excerpts">
        <thead>
          <Row>
            <SortHead view={view} sort="title">Title</SortHead>
            <SortHead view={view} sort="composer" className="hidden md:table-cell">Composer</SortHead>
            <Th className="hidden sm:table-cell">Key</Th>
            <Th className="hidden pr-6 text-right sm:table-cell">Bars</Th>
            <Th>State</Th>
            <SortHead view={view} sort="added" className="hidden lg:table-cell">Added</SortHead>
          </Row>
        </thead>
        <tbody>
          {rows.map((score) => <ScoreRows key={score.id} score={score} excerpts={excerpts.get(score.id) ?? []} />)}
        </tbody>
      </Table>
    </>
  );
}

interface SortHeadProps {
  readonly view: LibraryQuery;
  readonly sort: LibrarySort;
  readonly className?: string;
  readonly children: string;
}

function SortHead({ view, sort, className, children }: SortHeadProps) {
  const direction = view.sort === sort ? (isDescending(view) ? 'descending' : 'ascending') : null;
  return (
    <SortTh direction={direction} {...(className ? { className } : {})}>
      <Link href={sortHref(view, sort)} scroll={false}>{children}</Link>
    </SortTh>
  );
}
