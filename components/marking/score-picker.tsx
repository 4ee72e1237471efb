'use client';

import '@/components/score/score.css';
import { type KeyboardEvent, useMemo } from 'react';
import { Button, ErrorNote, Skeleton } from '@/components/ui';
import { describeLabel } from '@/components/reading/label-words';
import { useScore } from '@/components/reading/use-score';
import { type LabelMark, Lanes } from '@/components/score/lanes';
import { ScoreView } from '@/components/score/score-view';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';

interface ScorePickerProps {
  readonly scoreUrl: string;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly reading: Reading;
  readonly sheet: ConventionSheet;
  readonly currentId: string;
  /** By label id: what stands at a label instead of its state. */
  readonly marks: ReadonlyMap<string, LabelMark>;
  /** Labels shown grey. */
  readonly givenIds?: ReadonlySet<string>;
  /** Words after a label's own, for those who do not see the mark. */
  say?(label: Label): string;
  onSelect(labelId: string): void;
  /** Enter or a double click on a label. */
  onToggle?(labelId: string): void;
}

/** Small enough for whole phrases, large enough to read the numerals. */
const ZOOM = 0.75;

/** The score with a reading under it, to choose labels on: by mouse, or with the arrow keys and Enter. */
export function ScorePicker(props: ScorePickerProps) {
  const { loaded, retry } = useScore(props.scoreUrl);
  if (loaded.state === 'loading') return <Skeleton className="h-72 w-full" />;
  if (loaded.state === 'failed') {
    return <ErrorNote title="The score is not here" action={<Button size="small" onClick={retry}>Try again</Button>}>{loaded.message}</ErrorNote>;
  }
  return <LoadedPicker {...props} xml={loaded.xml} score={loaded.score} />;
}

function LoadedPicker({ xml, score, reading, sheet, currentId, marks, givenIds, say, onSelect, onToggle, firstBar, lastBar }: ScorePickerProps & { xml: string; score: Score }) {
  const selected = useMemo(() => new Set([currentId]), [currentId]);
  const current = reading.labels.find((label) => label.id === currentId) ?? reading.labels[0];
  const describe = (label: Label) => [describeLabel(score, label, sheet), say?.(label)].filter(Boolean).join(', ');
  const onKeyDown = (event: KeyboardEvent) => {
    const step = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0;
    const place = reading.labels.findIndex((label) => label.id === currentId);
    if (step !== 0) {
      const next = reading.labels[place + step];
      if (next) moveTo(event.currentTarget, next.id, onSelect);
    } else if (event.key === 'Enter' || event.key === ' ') onToggle?.(currentId);
    else return;
    event.preventDefault();
  };
  return (
    <div role="group" aria-label="Labels on the score" className="plate overflow-x-auto bg-sheet" onKeyDown={onKeyDown}>
      <ScoreView
        xml={xml}
        score={score}
        firstBar={firstBar}
        lastBar={lastBar}
        zoom={ZOOM}
        heldTick={current?.start ?? 0}
        underlay={() => null}
        overlay={(geometry) => (
          <Lanes
            geometry={geometry}
            reading={reading}
            sheet={sheet}
            currentId={currentId}
            selectedIds={selected}
            marks={marks}
            {...(givenIds ? { givenIds } : {})}
            describe={describe}
            onSelect={onSelect}
            onOpen={(labelId) => onToggle?.(labelId)}
          />
        )}
      />
    </div>
  );
}

/** Selects and takes the focus along, so that the next key goes to the next label. */
function moveTo(region: Element, labelId: string, onSelect: (labelId: string) => void): void {
  onSelect(labelId);
  requestAnimationFrame(() => region.querySelector<HTMLElement>(`[data-label="${labelId}"]`)?.focus());
}
