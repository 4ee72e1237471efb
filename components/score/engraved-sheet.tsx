'use client';

import type { OpenSheetMusicDisplay } from 'opensheetmusicdisplay';
import { useEffect, useRef } from 'react';
import type { Score } from '@/lib/score/score';
import { readGeometry } from './engraving';
import type { SheetGeometry } from './geometry';
import { sliceMeasures } from './slice-measures';
import { type Spacing, onsetsPerQuarter, widenFor } from './spacing';

export interface EngravedSheetProps {
  /** The whole score's partwise MusicXML, parsed once for all sheets. */
  readonly document: Document;
  readonly score: Score;
  /** First and last bar drawn, indices of `score.bars`. */
  readonly first: number;
  readonly last: number;
  /** Width to engrave into, in engraving pixels. */
  readonly width: number;
  /** Room to leave under each system, in engraving pixels. */
  readonly room: number;
  onEngraved(geometry: SheetGeometry): void;
  onFailed(message: string): void;
}

/**
 * The engraver's drawing of some bars, in engraving pixels, in the colour of the text around it. It is engraved anew only
 * when the bars, the width or the room change; zoom is the parent's scaling.
 */
export function EngravedSheet(props: EngravedSheetProps) {
  const { document, score, first, last, width, room, onEngraved, onFailed } = props;
  const host = useRef<HTMLDivElement>(null);
  const said = useRef({ onEngraved, onFailed });
  useEffect(() => {
    said.current = { onEngraved, onFailed };
  });

  useEffect(() => {
    let cancelled = false;
    const box = host.current as HTMLDivElement;
    engrave(box, { document, score, first, last, width, room })
      .then((geometry) => geometry && !cancelled && said.current.onEngraved(geometry))
      .catch((cause: unknown) => {
        if (!cancelled) said.current.onFailed(cause instanceof Error ? cause.message : String(cause));
      });
    return () => {
      cancelled = true;
    };
  }, [document, score, first, last, width, room]);

  return <div ref={host} className="engraving" aria-hidden="true" style={{ width }} />;
}

export type Engraving = Pick<EngravedSheetProps, 'document' | 'score' | 'first' | 'last' | 'width' | 'room'>;

/** Fetched as soon as this module is there, while the score itself is still on its way. */
const engraver = typeof window === 'undefined' ? null : import('opensheetmusicdisplay');

async function engrave(host: HTMLDivElement, sheet: Engraving): Promise<SheetGeometry | null> {
  const { OpenSheetMusicDisplay } = await (engraver ?? import('opensheetmusicdisplay'));
  const proof = layProof(host, sheet.width);
  const osmd = new OpenSheetMusicDisplay(proof, options(sheet.score));
  makeRoom(osmd, sheet.room, widenFor(onsetsPerQuarter(sheet.score, sheet.first, sheet.last)));
  await osmd.load(sliceMeasures(sheet.document, sheet.first, sheet.last));
  if (!proof.isConnected) return null;
  osmd.zoom = 1;
  osmd.render();
  showProof(host, proof);
  const svg = proof.querySelector('svg');
  const geometry = readGeometry(osmd, sheet.score, sheet.first);
  return { ...geometry, width: sheet.width, height: Math.max(svg?.height.baseVal.value ?? 0, geometry.height + sheet.room) };
}

/** The engraver needs an element that is laid out; the old drawing stays to be seen until the new one is ready. */
function layProof(host: HTMLDivElement, width: number): HTMLDivElement {
  const proof = document.createElement('div');
  proof.style.cssText = `position:absolute;inset:0 auto auto 0;visibility:hidden;width:${width}px`;
  host.querySelectorAll(':scope > [data-proof="waiting"]').forEach((other) => other.remove());
  proof.dataset['proof'] = 'waiting';
  host.append(proof);
  return proof;
}

function showProof(host: HTMLDivElement, proof: HTMLDivElement): void {
  proof.dataset['proof'] = 'shown';
  proof.style.cssText = '';
  host.replaceChildren(proof);
}

function options(score: Score) {
  return {
    backend: 'svg',
    autoResize: false,
    drawCredits: false,
    drawTitle: false,
    disableCursor: true,
    drawPartNames: score.parts.length > 1,
    drawMeasureNumbersOnlyAtSystemStart: true,
    stretchLastSystemLine: false,
    autoGenerateMultipleRestMeasuresFromRestMeasures: false,
    defaultFontFamily: 'Alegreya, Georgia, serif',
  };
}

/** Widened spacing keeps neighbouring labels apart; the gap between systems holds our lanes. */
function makeRoom(osmd: OpenSheetMusicDisplay, room: number, spacing: Spacing): void {
  const rules = osmd.EngravingRules;
  rules.MinSkyBottomDistBetweenSystems = room / 10 + 1;
  rules.MinimumDistanceBetweenSystems = room / 10 + 1;
  rules.PageTopMargin = 2;
  rules.PageBottomMargin = room / 10;
  rules.PageLeftMargin = 3;
  rules.PageRightMargin = 1;
  rules.VoiceSpacingMultiplierVexflow = spacing.multiplier;
  rules.VoiceSpacingAddendVexflow = spacing.addend;
}
