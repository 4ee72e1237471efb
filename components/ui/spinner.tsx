import { classNames } from './class-names';

/** A turning ring. `label` is spoken; pass '' where the words beside it already say it. */
export function Spinner({ label = 'Loading', className }: { readonly label?: string; readonly className?: string }) {
  return (
    <span role={label ? 'status' : undefined} aria-hidden={label ? undefined : true} className={classNames('inline-flex', className)}>
      <svg viewBox="0 0 16 16" className="size-[1em] animate-turn" aria-hidden="true">
        <circle cx="8" cy="8" r="6.25" fill="none" stroke="currentColor" strokeWidth="1" opacity="0.35" />
        <path d="M8 1.75a6.25 6.25 0 0 1 6.25 6.25" fill="none" stroke="currentColor" strokeWidth="2" />
      </svg>
      {label ? <span className="sr-only">{label}</span> : null}
    </span>
  );
}
