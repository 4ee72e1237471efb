'use client';

import { type PointerEvent, useRef } from 'react';
import { type SheetGeometry, findSystemAt, snapTick } from './geometry';

interface PointerSurfaceProps {
  readonly geometry: SheetGeometry;
  /** Moments a pointer can mean: onsets, sorted. */
  readonly onsets: readonly number[];
  /** Pressed at a moment; `onTo` is where a drag has come to, the same while it is a press. */
  onPress(tick: number, extend: boolean): void;
  onDrag(tick: number): void;
}

/** Takes presses and drags on the staves and says which moment of the score they mean. */
export function PointerSurface({ geometry, onsets, onPress, onDrag }: PointerSurfaceProps) {
  const last = useRef<number | null>(null);
  const tickAt = (event: PointerEvent<HTMLDivElement>): number | null => {
    const box = event.currentTarget.getBoundingClientRect();
    const scale = box.width / geometry.width || 1;
    const system = findSystemAt(geometry, (event.clientY - box.top) / scale);
    return system && snapTick(geometry, system.index, (event.clientX - box.left) / scale - 6, onsets);
  };
  return (
    <div
      className="absolute inset-0"
      data-testid="score-surface"
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        const tick = tickAt(event);
        if (tick === null) return;
        last.current = tick;
        if (event.pointerType === 'mouse') event.currentTarget.setPointerCapture(event.pointerId);
        onPress(tick, event.shiftKey);
      }}
      onPointerMove={(event) => {
        if (last.current === null || event.pointerType !== 'mouse') return;
        const tick = tickAt(event);
        if (tick === null || tick === last.current) return;
        last.current = tick;
        onDrag(tick);
      }}
      onPointerUp={() => {
        last.current = null;
      }}
      onPointerCancel={() => {
        last.current = null;
      }}
    />
  );
}
