import type { ReactNode } from 'react';
import { classNames } from './class-names';

/** Marks of state, told apart by outline alone: they are read in one colour too. */
export const SHAPES = ['ring', 'disc', 'half', 'check', 'cross', 'diamond', 'dash', 'triangle', 'dots'] as const;
export type Shape = (typeof SHAPES)[number];

const DRAWING: Readonly<Record<Shape, ReactNode>> = {
  ring: <circle cx="8" cy="8" r="5.25" fill="none" />,
  disc: <circle cx="8" cy="8" r="5.25" fill="currentColor" />,
  half: (
    <>
      <circle cx="8" cy="8" r="5.25" fill="none" />
      <path d="M8 2.75a5.25 5.25 0 0 1 0 10.5z" fill="currentColor" stroke="none" />
    </>
  ),
  check: <path d="M2.5 8.5l3.5 4L13.5 3.5" fill="none" strokeWidth="2" />,
  cross: <path d="M3.5 3.5l9 9M12.5 3.5l-9 9" fill="none" strokeWidth="2" />,
  diamond: <path d="M8 1.75L14.25 8 8 14.25 1.75 8z" fill="none" />,
  dash: <path d="M3 8h10" fill="none" strokeWidth="2" />,
  triangle: <path d="M8 2.25L14.5 13.5h-13z" fill="none" />,
  dots: <path d="M3 8h.01M8 8h.01M13 8h.01" fill="none" strokeWidth="2.6" strokeLinecap="round" />,
};

export function ShapeIcon({ shape, className }: { readonly shape: Shape; readonly className?: string }) {
  return (
    <svg
      viewBox="0 0 16 16"
      aria-hidden="true"
      stroke="currentColor"
      strokeWidth="1.4"
      className={classNames('size-[0.8em] shrink-0', className)}
    >
      {DRAWING[shape]}
    </svg>
  );
}
