import type { NumeralParts } from '@/lib/theory/typeset';
import { LabelFace, NUMERAL_SIZE } from './label-face';
import { NUMERAL_LINE } from './lane-model';

/** A pivot in the key that follows it. */
export interface PivotFace {
  /** The key's name as printed. */
  readonly key: string;
  readonly parts: NumeralParts;
}

/** Hangs under a label's numeral: the same chord in the key that begins after it, bracketed to it. */
export function PivotMark({ pivot }: { readonly pivot: PivotFace }) {
  return (
    <span aria-hidden="true" data-pivot className="absolute left-0 flex items-center gap-1.5 whitespace-nowrap" style={{ top: NUMERAL_LINE.rowHeight }}>
      <span className="absolute -top-3 -left-1.5 h-7 w-1 border-y border-l border-rule-strong" />
      <span className="font-book text-[14px] text-ink-soft italic">{pivot.key}</span>
      <span className="inline-flex h-[26px] items-center" style={{ fontSize: NUMERAL_SIZE }}><LabelFace parts={pivot.parts} /></span>
    </span>
  );
}
