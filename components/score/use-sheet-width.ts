'use client';

import { type RefObject, useEffect, useState } from 'react';

/** Narrower than this, systems hold too little to read: the region scrolls sideways instead. */
const MIN_ENGRAVED = 560;
/** A width this close to the engraved one is reached by scaling alone. */
const TOLERANCE = 0.04;
const SETTLE_MS = 220;

export interface SheetWidth {
  /** What the engraver is given, in engraving pixels; null until the region has been measured. */
  readonly engraved: number | null;
  /** Screen pixels per engraving pixel. */
  readonly scale: number;
}

/**
 * Follows the region's width and the zoom. Small changes only scale what is drawn; larger ones scale at once and engrave
 * again when they have come to rest.
 */
export function useSheetWidth(region: RefObject<HTMLElement | null>, zoom: number): SheetWidth {
  const [available, setAvailable] = useState<number | null>(null);
  const [engraved, setEngraved] = useState<number | null>(null);

  useEffect(() => {
    const element = region.current;
    if (!element) return;
    const observer = new ResizeObserver(() => setAvailable(element.clientWidth));
    observer.observe(element);
    return () => observer.disconnect();
  }, [region]);

  const wanted = available === null ? null : Math.max(MIN_ENGRAVED, Math.floor(available / zoom));
  const near = wanted !== null && engraved !== null && Math.abs(wanted - engraved) / engraved < TOLERANCE;

  useEffect(() => {
    if (wanted === null || near) return;
    const timer = setTimeout(() => setEngraved(wanted), engraved === null ? 0 : SETTLE_MS);
    return () => clearTimeout(timer);
  }, [wanted, near, engraved]);

  return { engraved, scale: scaleOf(available, wanted, engraved, near, zoom) };
}

function scaleOf(available: number | null, wanted: number | null, engraved: number | null, near: boolean, zoom: number): number {
  const fits = near && available !== null && wanted !== null && wanted > MIN_ENGRAVED && engraved !== null;
  return fits ? available / engraved : zoom;
}
