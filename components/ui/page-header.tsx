import type { ReactNode } from 'react';
import { Breadcrumbs, type Crumb } from './breadcrumbs';

interface PageHeaderProps {
  readonly title: ReactNode;
  /** One line under the title: composer, course, what the page is for. */
  readonly subtitle?: ReactNode;
  readonly crumbs?: readonly Crumb[];
  readonly actions?: ReactNode;
}

/** The head of a page, like the head of a proof: title, second line, actions, a rule. */
export function PageHeader({ title, subtitle, crumbs, actions }: PageHeaderProps) {
  return (
    <header className="mb-6 border-b border-rule-strong pt-6 pb-4">
      {crumbs ? <div className="mb-2"><Breadcrumbs crumbs={crumbs} /></div> : null}
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <div className="min-w-0">
          <h1 className="text-display break-words">{title}</h1>
          {subtitle ? <div className="mt-1 font-book text-lead text-ink-soft italic">{subtitle}</div> : null}
        </div>
        {actions ? <div className="flex flex-wrap items-center gap-2">{actions}</div> : null}
      </div>
    </header>
  );
}

interface SectionProps {
  readonly title: ReactNode;
  readonly aside?: ReactNode;
  readonly children: ReactNode;
  readonly id?: string;
}

/** A part of a page under its own head. */
export function Section({ title, aside, children, id }: SectionProps) {
  return (
    <section className="mb-10" {...(id ? { id } : {})}>
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-6">
        <h2 className="text-title">{title}</h2>
        {aside ? <div className="text-small text-ink-soft">{aside}</div> : null}
      </div>
      {children}
    </section>
  );
}

/** Facts as term and value, in a column or side by side. */
export function Facts({ facts }: { readonly facts: readonly { readonly term: string; readonly value: ReactNode }[] }) {
  return (
    <dl className="grid grid-cols-[max-content_minmax(0,1fr)] gap-x-5 gap-y-1.5">
      {facts.map(({ term, value }) => (
        <div key={term} className="contents">
          <dt className="caps text-small leading-normal text-ink-soft">{term}</dt>
          <dd className="min-w-0 break-words">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
