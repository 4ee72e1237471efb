import Link from 'next/link';
import { Fragment } from 'react';

export interface Crumb {
  readonly label: string;
  /** Absent on the page one is on. */
  readonly href?: string;
}

/** Where this page lies. The last crumb is the page itself. */
export function Breadcrumbs({ crumbs }: { readonly crumbs: readonly Crumb[] }) {
  return (
    <nav aria-label="You are here" className="text-small text-ink-soft">
      <ol className="flex flex-wrap items-baseline gap-x-2">
        {crumbs.map((crumb, place) => (
          <Fragment key={`${place} ${crumb.label}`}>
            {place > 0 ? <li aria-hidden="true" className="text-rule-strong">/</li> : null}
            <li className="min-w-0">
              {crumb.href ? (
                <Link href={crumb.href} className="link inline-block min-h-6 content-center">{crumb.label}</Link>
              ) : (
                <span aria-current="page" className="inline-block min-h-6 content-center">{crumb.label}</span>
              )}
            </li>
          </Fragment>
        ))}
      </ol>
    </nav>
  );
}
