'use client';

import { type ReactNode, memo, useMemo, useState } from 'react';
import { type Shape, ShapeIcon, TONE_TEXT, type Tone, classNames } from '@/components/ui';
import type { Label, Reading } from '@/lib/harmony/reading';
import { findPivot } from '@/lib/harmony/edit-keys';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { type NumeralParts, typesetNumeral } from '@/lib/theory/typeset';
import { formatKeyForPeople } from '@/lib/theory/key';
import type { SheetGeometry } from './geometry';
import { KeyLine } from './key-line';
import { LabelFace, NUMERAL_SIZE, faceOf, faceWidth } from './label-face';
import { lookOf } from './label-look';
import { NUMERAL_LINE, type PlacedLabel, layLabels } from './lane-model';
import { type PivotFace, PivotMark } from './pivot-mark';
import { LaneRules } from './lane-rules';

/** Shown at a label in place of its state: a verdict, say. */
export interface LabelMark {
  readonly shape: Shape;
  readonly tone: Tone;
  /** Printed beside the shape: `1/2`. */
  readonly note?: string;
}

export interface LanesProps {
  readonly geometry: SheetGeometry;
  readonly reading: Reading;
  readonly sheet: ConventionSheet;
  /** The label that has the keyboard, and all that are selected with it. */
  readonly currentId: string;
  readonly selectedIds: ReadonlySet<string>;
  /** Labels that belong to the frame, not to the work: shown, greyed, not to be edited. */
  readonly givenIds?: ReadonlySet<string>;
  readonly marks?: ReadonlyMap<string, LabelMark>;
  /** Everything a label says, in words. */
  describe(label: Label): string;
  onSelect(labelId: string, extend: boolean): void;
  onOpen(labelId: string): void;
  onOpenKey?: ((regionStart: number) => void) | undefined;
  /** What stands at the current label: the line that is typed into. */
  readonly entry?: ReactNode;
}

/** The key line and the numeral line under every system of one sheet. */
export function Lanes(props: LanesProps) {
  const { geometry, reading, sheet } = props;
  const start = geometry.bars[0]?.start ?? 0;
  const end = geometry.bars.at(-1)?.end ?? 0;
  const labels = useSameLabels(useMemo(() => reading.labels.filter((l) => l.start < end && l.end > start), [reading.labels, start, end]));
  const faces = useMemo(() => facesOf(labels, sheet), [labels, sheet]);
  const { regions } = reading;
  const pivots = useMemo(() => pivotsOf(regions, labels, sheet), [regions, labels, sheet]);
  const model = useMemo(
    () => layLabels(geometry, labels, (label) => faceWidth(faces.get(label.id) ?? null), (label) => belowWidth(pivots.get(label.id))),
    [geometry, labels, faces, pivots],
  );
  const { describe, onSelect, onOpen } = props;
  const words = useMemo(() => new Map(labels.map((label) => [label.id, describe(label)])), [labels, describe]);

  // Between the labels the staves take the pointer: a drag over them selects a span.
  return (
    <div className="pointer-events-none absolute inset-0 [&>button]:pointer-events-auto [&>div]:pointer-events-auto">
      <LaneRules geometry={geometry} model={model} />
      <KeyLine geometry={geometry} regions={reading.regions} onOpen={props.onOpenKey} />
      {model.labels.map((placed) => (
        <LabelView
          key={placed.label.id}
          label={placed.label}
          {...position(geometry, placed)}
          face={faces.get(placed.label.id) ?? null}
          pivot={pivots.get(placed.label.id) ?? null}
          words={(words.get(placed.label.id) ?? '') + sayPivot(pivots.get(placed.label.id))}
          current={placed.label.id === props.currentId}
          selected={props.selectedIds.has(placed.label.id)}
          given={props.givenIds?.has(placed.label.id) ?? false}
          mark={props.marks?.get(placed.label.id)}
          onSelect={onSelect}
          onOpen={onOpen}
        />
      ))}
      <EntryPlace geometry={geometry} placed={model.labels.find((p) => p.label.id === props.currentId)}>{props.entry}</EntryPlace>
    </div>
  );
}

/** The same array as before as long as it holds the same labels: an edit elsewhere lays nothing out anew here. */
function useSameLabels(found: readonly Label[]): readonly Label[] {
  const [kept, keep] = useState(found);
  const isSame = kept.length === found.length && kept.every((label, i) => label === found[i]);
  if (!isSame) keep(found);
  return isSame ? kept : found;
}

function facesOf(labels: readonly Label[], sheet: ConventionSheet): ReadonlyMap<string, NumeralParts | null> {
  return new Map(labels.map((label, i) => [label.id, faceOf(label, labels[i - 1]?.numeral ?? null, sheet)]));
}

/** Pivots of a sheet: what they are in the key after them, and that key's name. */
function pivotsOf(regions: Reading['regions'], labels: readonly Label[], sheet: ConventionSheet): ReadonlyMap<string, PivotFace> {
  const found = labels.flatMap((label) => {
    const pivot = findPivot({ regions }, label);
    return pivot ? [[label.id, { key: formatKeyForPeople(pivot.key), parts: typesetNumeral(pivot.numeral, pivot.key.mode, sheet) }] as const] : [];
  });
  return new Map(found);
}

/** `, pivot: two in G major`; nothing for a label that is none. */
function sayPivot(pivot: PivotFace | undefined): string {
  return pivot ? `, pivot: ${pivot.parts.spoken} in ${pivot.key}` : '';
}

/** Room for the second numeral and the name of its key before it. */
function belowWidth(pivot: PivotFace | undefined): number {
  return pivot ? faceWidth(pivot.parts) + pivot.key.length * 7 + 12 : 0;
}

function position(geometry: SheetGeometry, { placed, system }: PlacedLabel): { left: number; top: number; scale: number } {
  const top = (geometry.systems[system]?.laneTop ?? 0) + NUMERAL_LINE.top + placed.row * NUMERAL_LINE.rowHeight;
  return { left: placed.left, top, scale: placed.scale };
}

/** Hangs what is typed under its label; undoes the sheet's scale, so that it is as large as the rest of the page. */
function EntryPlace({ geometry, placed, children }: { geometry: SheetGeometry; placed: PlacedLabel | undefined; children: ReactNode }) {
  if (!children || !placed) return null;
  const { left, top } = position(geometry, placed);
  const fromRight = left > geometry.width / 2;
  const place = fromRight ? { right: geometry.width - left - 40 } : { left };
  return (
    <div className="entry-place absolute z-20" style={{ ...place, top: top + NUMERAL_LINE.rowHeight }}>
      <div className={fromRight ? 'w-max origin-top-right' : 'w-max origin-top-left'} style={{ transform: 'scale(calc(1 / var(--sheet-scale, 1)))' }}>
        {children}
      </div>
    </div>
  );
}

interface LabelViewProps {
  readonly label: Label;
  readonly left: number;
  readonly top: number;
  readonly scale: number;
  readonly face: NumeralParts | null;
  readonly pivot: PivotFace | null;
  readonly words: string;
  readonly current: boolean;
  readonly selected: boolean;
  readonly given: boolean;
  readonly mark: LabelMark | undefined;
  onSelect(labelId: string, extend: boolean): void;
  onOpen(labelId: string): void;
}

const LabelView = memo(function LabelView(props: LabelViewProps) {
  const { label, left, top, scale, face, pivot, words, current, selected, given, mark, onSelect, onOpen } = props;
  const look = lookOf(label);
  return (
    <div
      role="button"
      tabIndex={current ? 0 : -1}
      data-label={label.id}
      data-state={look.word}
      aria-label={words}
      aria-pressed={selected}
      onClick={(event) => onSelect(label.id, event.shiftKey)}
      onDoubleClick={() => onOpen(label.id)}
      className={classNames(
        'lane-label absolute min-w-[26px] origin-top-left cursor-default rounded-plate select-none',
        given ? 'text-ink-soft' : 'text-ink',
        selected && 'bg-selection',
      )}
      style={{ left, top, transform: scale === 1 ? undefined : `scale(${scale})` }}
    >
      <span aria-hidden="true" className="inline-flex h-[26px] items-center px-px" style={{ fontSize: NUMERAL_SIZE }}>
        <LabelFace parts={face} />
      </span>
      <StateOf given={given} mark={mark ?? look} />
      {pivot ? <PivotMark pivot={pivot} /> : null}
    </div>
  );
});

function StateOf({ given, mark }: { readonly given: boolean; readonly mark: LabelMark }) {
  if (given) return null;
  return (
    <span aria-hidden="true" className={classNames('absolute top-[25px] left-px flex items-center gap-0.5 text-[13px] leading-none whitespace-nowrap', TONE_TEXT[mark.tone])}>
      <ShapeIcon shape={mark.shape} className="size-[11px]!" />
      {mark.note}
    </span>
  );
}
