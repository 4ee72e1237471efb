'use client';

import { type PointerEvent, useState } from 'react';
import { type SheetGeometry, placeTick, snapTick } from './geometry';

interface BoundaryGripProps {
  readonly geometry: SheetGeometry;
  /** Where the label begins now, and the moments it may begin at. */
  readonly start: number;
  readonly onsets: readonly number[];
  onMove(tick: number): void;
}

/** The edge of the selected label on the staves: dragged, it snaps to the notes. The keyboard has its own commands. */
export function BoundaryGrip({ geometry, start, onsets, onMove }: BoundaryGripProps) {
  const [at, setAt] = useState<number | null>(null);
  const place = placeTick(geometry, at ?? start);
  const system = place && geometry.systems[place.system];
  if (!place || !system) return null;
  const top = system.laneTop + 24;
  const follow = (event: PointerEvent<HTMLDivElement>) => {
    const sheet = event.currentTarget.parentElement?.getBoundingClientRect();
    if (at === null || !sheet) return;
    const scale = sheet.width / geometry.width || 1;
    setAt(snapTick(geometry, place.system, (event.clientX - sheet.left) / scale, onsets) ?? start);
  };
  return (
    <div
      aria-hidden="true"
      title="Drag to where the label begins"
      className="absolute z-10 flex w-[calc(24px/var(--sheet-scale,1))] -translate-x-1/2 cursor-ew-resize touch-none justify-center"
      style={{ left: place.x - 3, top: system.staffBottom + 4, height: top - system.staffBottom - 4 }}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        event.preventDefault();
        setAt(start);
      }}
      onPointerMove={follow}
      onPointerUp={() => {
        if (at !== null && at !== start) onMove(at);
        setAt(null);
      }}
      onPointerCancel={() => setAt(null)}
    >
      <span className={at === null ? 'h-full w-[3px] bg-rule-strong' : 'h-full w-[3px] bg-ink'} />
    </div>
  );
}
