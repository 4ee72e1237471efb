import { useMemo } from 'react';
import { BesideLane } from '@/components/score/beside-lane';
import type { SheetGeometry } from '@/components/score/geometry';
import { LANE_ROOM } from '@/components/score/score-view';
import type { Label } from '@/lib/harmony/reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { Beside } from './use-beside';

interface ComparedLaneProps {
  readonly geometry: SheetGeometry;
  readonly beside: Beside;
  readonly sheet: ConventionSheet;
  onSelect(label: Label): void;
}

/** The reading beside this one, under its lanes, with what differs marked. */
export function ComparedLane({ geometry, beside, sheet, onSelect }: ComparedLaneProps) {
  const differing = useMemo(() => new Set(beside.differences.map((d) => d.theirs.id)), [beside.differences]);
  return (
    <BesideLane
      geometry={geometry}
      below={LANE_ROOM}
      reading={beside.reading}
      sheet={sheet}
      name={beside.by}
      differing={differing}
      currentId={beside.current?.theirs.id ?? null}
      onSelect={onSelect}
    />
  );
}
