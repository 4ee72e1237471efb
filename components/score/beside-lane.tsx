'use client';

import { memo, useMemo } from 'react';
import { ShapeIcon, TONE_TEXT, classNames } from '@/components/ui';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { SheetGeometry } from './geometry';
import { KeyLine } from './key-line';
import { LabelFace, NUMERAL_SIZE, faceOf, faceWidth } from './label-face';
import { NUMERAL_LINE, layLabels } from './lane-model';
import { LaneRules } from './lane-rules';

interface BesideLaneProps {
  readonly geometry: SheetGeometry;
  /** How far under the first reading's lanes this one's stand, in engraving pixels. */
  readonly below: number;
  readonly reading: Reading;
  readonly sheet: ConventionSheet;
  /** Whose it is, printed at the head of each system. */
  readonly name: string;
  /** Labels that differ from the first reading's; of those, the one looked at. */
  readonly differing: ReadonlySet<string>;
  readonly currentId: string | null;
  onSelect(label: Label): void;
}

/** A second reading's key line and numeral line under the first's, to be read and compared. */
export const BesideLane = memo(function BesideLane(props: BesideLaneProps) {
  const { geometry, below, reading, sheet, name, differing, currentId, onSelect } = props;
  const lowered = useMemo(() => lower(geometry, below), [geometry, below]);
  const start = geometry.bars[0]?.start ?? 0;
  const end = geometry.bars.at(-1)?.end ?? 0;
  const labels = useMemo(() => reading.labels.filter((l) => l.start < end && l.end > start), [reading.labels, start, end]);
  const faces = useMemo(() => new Map(labels.map((label, i) => [label.id, faceOf(label, labels[i - 1]?.numeral ?? null, sheet)])), [labels, sheet]);
  const model = useMemo(() => layLabels(lowered, labels, (label) => faceWidth(faces.get(label.id) ?? null)), [lowered, labels, faces]);
  return (
    <div className="pointer-events-none absolute inset-0">
      {lowered.systems.map((system) => (
        <p key={system.index} aria-hidden="true" className="absolute right-2 max-w-40 truncate text-right text-[13px] text-ink-soft" style={{ top: system.laneTop - 4, left: Math.max(0, system.right - 160) }}>{name}</p>
      ))}
      <LaneRules geometry={lowered} model={model} />
      <KeyLine geometry={lowered} regions={reading.regions} />
      {model.labels.map(({ label, system, placed }) => {
        const differs = differing.has(label.id);
        return (
          <div
            key={label.id}
            aria-hidden="true"
            data-beside={label.id}
            data-differs={differs}
            onClick={() => onSelect(label)}
            className={classNames('pointer-events-auto absolute min-w-[26px] origin-top-left cursor-default rounded-plate select-none', label.id === currentId && 'bg-selection')}
            style={{
              left: placed.left,
              top: (lowered.systems[system]?.laneTop ?? 0) + NUMERAL_LINE.top + placed.row * NUMERAL_LINE.rowHeight,
              transform: placed.scale === 1 ? undefined : `scale(${placed.scale})`,
            }}
          >
            <span className="inline-flex h-[26px] items-center px-px" style={{ fontSize: NUMERAL_SIZE }}>
              <LabelFace parts={faces.get(label.id) ?? null} />
            </span>
            {differs ? <span className={classNames('absolute top-[25px] left-px', TONE_TEXT.eye)}><ShapeIcon shape="triangle" className="size-[11px]!" /></span> : null}
          </div>
        );
      })}
    </div>
  );
});

function lower(geometry: SheetGeometry, by: number): SheetGeometry {
  return { ...geometry, systems: geometry.systems.map((system) => ({ ...system, laneTop: system.laneTop + by })) };
}
