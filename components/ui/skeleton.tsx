import { classNames } from './class-names';

/** A place kept for what is loading; give it the size of what comes, so that nothing moves. */
export function Skeleton({ className }: { readonly className?: string }) {
  return <span aria-hidden="true" className={classNames('block animate-breathe rounded-plate bg-bench', className)} />;
}

/** Rows of a table that is loading; the words are for screen readers. */
export function SkeletonRows({ rows = 6, label = 'Loading' }: { readonly rows?: number; readonly label?: string }) {
  return (
    <div role="status" className="divide-y divide-rule border-y border-rule">
      <span className="sr-only">{label}</span>
      {Array.from({ length: rows }, (_, row) => (
        <div key={row} className="flex gap-6 py-3">
          <Skeleton className="h-5 w-2/5" />
          <Skeleton className="h-5 w-1/5" />
          <Skeleton className="h-5 w-1/6" />
        </div>
      ))}
    </div>
  );
}
