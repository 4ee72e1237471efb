'use client';

import { Button, buttonClass, ErrorNote, Skeleton, Spinner } from '@/components/ui';
import type { PrintOptions } from '@/lib/handout/print-options';
import './handout-preview.css';
import type { Print } from './use-print';

interface HandoutPreviewProps {
  readonly print: Print;
  readonly kind: PrintOptions['kind'];
  readonly paper: PrintOptions['paper'];
  readonly asked: number;
  readonly onRetry: () => void;
}

const RATIO: Readonly<Record<PrintOptions['paper'], string>> = { A4: 'aspect-[210/297]', Letter: 'aspect-[2159/2794]' };

/** The pages as they will be printed, and the way to the PDF. The pages are our own engraving, with every text escaped. */
export function HandoutPreview({ print, kind, paper, asked, onRetry }: HandoutPreviewProps) {
  const ready = print.printId !== null && !print.busy && !print.failure;
  return (
    <section aria-label="Preview" className="min-w-0">
      <div className="sticky top-0 z-10 mb-4 flex min-h-12 flex-wrap items-center gap-x-4 gap-y-2 border-b border-rule bg-paper py-2">
        {ready ? (
          <a className={buttonClass({ kind: 'primary' })} href={`/api/handouts/${print.printId}/file`} download>Download PDF</a>
        ) : (
          <Button kind="primary" disabled>Download PDF</Button>
        )}
        <p role="status" className="flex items-center gap-2 text-small text-ink-soft">
          {print.busy ? <><Spinner /> Engraving…</> : statusOf(print, kind, asked)}
        </p>
      </div>
      {print.failure ? <ErrorNote title="Not printed" action={<Button onClick={onRetry}>Try again</Button>}>{print.failure}</ErrorNote> : null}
      {print.pages.length === 0 && print.busy ? <Skeleton className={`${RATIO[paper]} w-full max-w-3xl`} /> : null}
      <div className={`flex max-w-3xl flex-col gap-6 ${print.busy ? 'opacity-60' : ''}`}>
        {print.pages.map((page, i) => (
          <div
            key={i}
            role="img"
            aria-label={`Page ${i + 1} of ${print.pages.length}`}
            className="handout-page border border-rule-strong"
            dangerouslySetInnerHTML={{ __html: page }}
          />
        ))}
      </div>
    </section>
  );
}

function statusOf(print: Print, kind: PrintOptions['kind'], asked: number): string {
  const pages = `${print.pages.length} ${print.pages.length === 1 ? 'page' : 'pages'}`;
  if (kind === 'key') return pages;
  return `${pages}, ${asked} ${asked === 1 ? 'blank' : 'blanks'}`;
}
