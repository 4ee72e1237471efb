import Link from 'next/link';

interface PaginationProps {
  /** 1-based. */
  readonly page: number;
  readonly pageCount: number;
  readonly hrefOf: (page: number) => string;
  readonly label: string;
}

/** Previous and next, and where one is. Nothing when there is one page. */
export function Pagination({ page, pageCount, hrefOf, label }: PaginationProps) {
  if (pageCount < 2) return null;
  return (
    <nav aria-label={label} className="mt-4 flex items-center justify-center gap-6 text-small">
      {page > 1 ? <Link className="link min-h-6 content-center" href={hrefOf(page - 1)} rel="prev">Previous</Link> : null}
      <span className="tabular text-ink-soft">Page {page} of {pageCount}</span>
      {page < pageCount ? <Link className="link min-h-6 content-center" href={hrefOf(page + 1)} rel="next">Next</Link> : null}
    </nav>
  );
}
