/** A share as a length; the figure stands beside it in words. */
export function ShareBar({ share }: { readonly share: number }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 100 6" preserveAspectRatio="none" className="block h-1.5 w-full text-madder">
      <path d="M0 5.5h100" stroke="var(--color-rule)" strokeWidth="1" />
      <rect x="0" y="0" width={Math.round(share * 100)} height="6" fill="currentColor" />
    </svg>
  );
}
