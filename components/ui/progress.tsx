import { classNames } from './class-names';

interface ProgressProps {
  readonly value: number;
  readonly max: number;
  /** What progresses, spoken: `Upload of prelude.mxl`. */
  readonly label: string;
  readonly className?: string;
}

/** A measured line. The number is for the words beside it; the element says it to screen readers. */
export function Progress({ value, max, label, className }: ProgressProps) {
  return (
    <progress
      value={value}
      max={max}
      aria-label={label}
      className={classNames(
        'block h-1.5 w-full appearance-none border border-rule-strong bg-sheet [&::-moz-progress-bar]:bg-verdigris',
        '[&::-webkit-progress-bar]:bg-sheet [&::-webkit-progress-value]:bg-verdigris',
        className,
      )}
    />
  );
}
