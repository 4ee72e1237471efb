/** The name and its device: a staff, and under the staff the line where the numerals stand. */
export function Wordmark({ small = false }: { readonly small?: boolean }) {
  return (
    <span className="inline-flex items-center gap-2.5">
      <svg viewBox="0 0 30 26" aria-hidden="true" className={small ? 'h-6' : 'h-9'} fill="none" stroke="currentColor">
        <path d="M.5 1.5h29M.5 4.75h29M.5 8h29M.5 11.25h29M.5 14.5h29" strokeWidth="0.8" />
        <path d="M6 18.25l3.25 7 3.25-7M4.75 18.25h2.6M11.2 18.25h2.6M17 18.25v7M15.6 18.25h2.8M15.6 25.25h2.8M21.25 18.25v7M19.85 18.25h2.8M19.85 25.25h2.8" strokeWidth="1" />
      </svg>
      <span className={small ? 'font-book text-lead leading-none font-medium tracking-wide' : 'font-book text-display leading-none font-medium tracking-wide'}>
        Understave
      </span>
    </span>
  );
}
