'use client';

import { type CSSProperties, type ReactNode, type RefObject, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { flushSync } from 'react-dom';
import type { Score } from '@/lib/score/score';
import { EngravedSheet } from './engraved-sheet';
import type { SheetGeometry } from './geometry';
import { type SheetRange, cutSheets, guessHeight } from './sheets';
import { useNearSheets } from './use-near-sheets';
import { useSheetWidth } from './use-sheet-width';

/** Room under each system for the key line and two rows of numerals, in engraving pixels. */
export const LANE_ROOM = 112;

export interface ScoreViewProps {
  /** Partwise MusicXML of the whole score. */
  readonly xml: string;
  readonly score: Score;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly zoom: number;
  /** Room to leave under each system, in engraving pixels; that of the lanes when it is left out. */
  readonly room?: number;
  /** A moment whose sheet stays engraved wherever the region is scrolled. */
  readonly heldTick: number;
  /** Drawn under and over an engraved sheet, in its coordinates. */
  underlay(geometry: SheetGeometry): ReactNode;
  overlay(geometry: SheetGeometry): ReactNode;
}

/** The score with room for lanes of ours under each system: sheets one below the other, scaled, each with its overlay. */
export function ScoreView({ xml, score, firstBar, lastBar, zoom, room = LANE_ROOM, heldTick, underlay, overlay }: ScoreViewProps) {
  const region = useRef<HTMLDivElement>(null);
  const { engraved, scale } = useSheetWidth(region, zoom);
  const document = useMemo(() => new DOMParser().parseFromString(xml, 'application/xml'), [xml]);
  const ranges = useMemo(() => cutSheets(firstBar, lastBar), [firstBar, lastBar]);
  const [known, setKnown] = useState<ReadonlyMap<number, SheetGeometry>>(new Map());
  const [failure, setFailure] = useState<string | null>(null);
  const held = ranges.findIndex((r) => isIn(score, r, heldTick));
  const near = useNearSheets(region, ranges.length, held);

  useOpening(region, engraved !== null, held);

  const heights = [...known].map(([index, g]) => ({ range: ranges[index] ?? { first: 0, last: 0 }, height: g.height }));
  const staves = score.parts.reduce((sum, part) => sum + part.staves, 0);

  return (
    <div ref={region} className="relative w-full">
      {failure ? <p role="alert" className="p-4 text-madder">The score cannot be drawn: {failure}</p> : null}
      {ranges.map((range, index) => {
        const geometry = known.get(index);
        const width = engraved ?? 0;
        const height = geometry?.height ?? guessHeight(range, heights, staves, width || 800);
        return (
          <div key={range.first} data-sheet={index} className="relative" style={{ width: width * scale, height: height * scale }}>
            {near.has(index) && engraved !== null ? (
              <div className="absolute top-0 left-0 origin-top-left" style={{ width, transform: `scale(${scale})`, '--sheet-scale': scale } as CSSProperties}>
                {geometry ? <div className="absolute inset-0">{underlay(geometry)}</div> : null}
                <EngravedSheet
                  document={document}
                  score={score}
                  first={range.first}
                  last={range.last}
                  width={engraved}
                  room={room}
                  // Together with the labels: the bare sheet need not be painted before.
                  onEngraved={(drawn) => flushSync(() => setKnown((all) => new Map(all).set(index, drawn)))}
                  onFailed={setFailure}
                />
                {geometry ? <div className="absolute inset-0">{overlay(geometry)}</div> : null}
              </div>
            ) : null}
            {geometry ? null : <EngravingSkeleton />}
          </div>
        );
      })}
    </div>
  );
}

/** Scrolls once, before anything is drawn, to the sheet that the view opens on: those before it need not be drawn then. */
function useOpening(region: RefObject<HTMLElement | null>, isMeasured: boolean, held: number): void {
  const opened = useRef(false);
  useLayoutEffect(() => {
    if (!isMeasured || opened.current) return;
    opened.current = true;
    if (held > 0) region.current?.querySelector(`[data-sheet="${held}"]`)?.scrollIntoView({ block: 'start' });
  }, [region, isMeasured, held]);
}

function isIn(score: Score, range: SheetRange, tick: number): boolean {
  const first = score.bars[range.first];
  const last = score.bars[range.last];
  return first !== undefined && last !== undefined && tick >= first.start && tick < last.start + last.length;
}

/** Empty staves where the engraving will stand. */
function EngravingSkeleton() {
  return (
    <div role="status" className="absolute inset-0 animate-breathe text-rule">
      <span className="sr-only">The score is being drawn.</span>
      <svg aria-hidden="true" className="h-full w-full">
        <defs>
          <pattern id="empty-staff" width="100" height="150" patternUnits="userSpaceOnUse">
            <path d="M0 40.5h100M0 48.5h100M0 56.5h100M0 64.5h100M0 72.5h100" stroke="currentColor" fill="none" />
          </pattern>
        </defs>
        <rect width="100%" height="100%" fill="url(#empty-staff)" />
      </svg>
    </div>
  );
}
