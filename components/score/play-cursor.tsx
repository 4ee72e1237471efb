'use client';

import { useEffect, useRef, useSyncExternalStore } from 'react';
import type { PlayPlace } from '@/components/sound/play-place';
import { type SheetGeometry, placeTick } from './geometry';

/** A line through the staves where the music is; it is brought into view when it comes to another system. */
export function PlayCursor({ geometry, place }: { readonly geometry: SheetGeometry; readonly place: PlayPlace }) {
  const tick = useSyncExternalStore(place.listen, place.get, () => null);
  const line = useRef<HTMLDivElement>(null);
  const at = tick === null ? null : placeTick(geometry, tick);
  const system = at ? geometry.systems[at.system] : undefined;
  useEffect(() => {
    line.current?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }, [system]);
  if (!at || !system) return null;
  const top = system.staffTop - 16;
  return (
    <div
      ref={line}
      aria-hidden="true"
      data-play-cursor={tick}
      className="pointer-events-none absolute w-[3px] bg-madder opacity-70"
      style={{ left: at.x + 4, top, height: system.staffBottom + 16 - top }}
    />
  );
}
