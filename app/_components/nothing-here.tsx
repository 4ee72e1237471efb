import { ButtonLink } from '@/components/ui';

/** What stands where nothing is, or nothing that is this reader's to see: the two are not told apart. */
export function NothingHere() {
  return (
    <div className="sheet flex min-h-[70dvh] flex-col items-start justify-center gap-4 py-16">
      <RestBar />
      <h1 className="text-display">There is nothing here</h1>
      <p className="measure text-ink-soft">
        The address is wrong, the thing was deleted, or it is not yours to see.
      </p>
      <ButtonLink href="/" kind="primary">To the start</ButtonLink>
    </div>
  );
}

/** A bar with a whole rest: silence is written down too. */
function RestBar() {
  return (
    <svg viewBox="0 0 160 40" aria-hidden="true" className="w-40 text-ink-soft" fill="none" stroke="currentColor" strokeWidth="0.8">
      <path d="M0 8.5h160M0 14.5h160M0 20.5h160M0 26.5h160M0 32.5h160M.5 8.5v24M159.5 8.5v24" />
      <path d="M74 14.5h12v3.4H74z" fill="currentColor" stroke="none" />
    </svg>
  );
}
