'use client';

import { useScore } from '@/components/reading/use-score';
import type { SheetGeometry } from '@/components/score/geometry';
import { ScoreView } from '@/components/score/score-view';
import '@/components/score/score.css';
import { Button, ErrorNote, Skeleton, Spinner } from '@/components/ui';
import type { BarRange } from './bar-range';

/** No lanes here: the systems stand close, in engraving pixels. */
const ROOM = 40;

interface ScoreSheetProps {
  readonly fileUrl: string;
  /** Bars to draw, by place; all when it is left out. */
  readonly shown?: BarRange;
  /** Bars that stand out. */
  readonly range: BarRange | null;
  /** A press on a bar, by mouse or finger; the keyboard has the fields above the score. */
  readonly onPick?: (bar: number) => void;
}

/** The score as it is engraved on the desk, without labels; bars can be picked on it. */
export function ScoreSheet({ fileUrl, shown, range, onPick }: ScoreSheetProps) {
  const { loaded, retry } = useScore(fileUrl);
  if (loaded.state === 'loading') return <Loading />;
  if (loaded.state === 'failed') {
    return <ErrorNote title="The score cannot be drawn" action={<Button size="small" onClick={retry}>Try again</Button>}>{loaded.message}</ErrorNote>;
  }
  const { score, xml } = loaded;
  const firstBar = shown?.first ?? 0;
  const lastBar = shown?.last ?? score.bars.length - 1;
  return (
    // The keyboard must be able to scroll what is wider than the screen.
    <div role="region" aria-label="The score" tabIndex={0} className="overflow-x-auto bg-sheet px-2 py-4">
      <div role="img" aria-label={`The score, ${lastBar - firstBar + 1} bars`}>
        <ScoreView
          xml={xml}
          score={score}
          firstBar={firstBar}
          lastBar={lastBar}
          zoom={0.72}
          room={ROOM}
          heldTick={score.bars[range?.first ?? firstBar]?.start ?? 0}
          underlay={(geometry) => (range ? <Bars geometry={geometry} of={range} className="border-b-3 border-ink bg-selection" /> : null)}
          overlay={(geometry) =>
            onPick ? <Bars geometry={geometry} of={{ first: firstBar, last: lastBar }} className="cursor-pointer hover:bg-ink/8" onPick={onPick} /> : null
          }
        />
      </div>
    </div>
  );
}

function Loading() {
  return (
    <div className="relative">
      <Skeleton className="h-80" />
      <p role="status" className="absolute inset-0 flex items-center justify-center gap-2 text-ink-soft">
        <Spinner label="" />
        The score is being fetched and drawn
      </p>
    </div>
  );
}

interface BarsProps {
  readonly geometry: SheetGeometry;
  readonly of: BarRange;
  readonly className: string;
  readonly onPick?: (bar: number) => void;
}

/** A surface for each bar of a range, from above its highest staff to below its lowest. */
function Bars({ geometry, of, className, onPick }: BarsProps) {
  return geometry.bars
    .filter(({ bar }) => bar >= of.first && bar <= of.last)
    .map(({ bar, system, left, right }) => {
      const box = geometry.systems.find(({ index }) => index === system);
      if (!box) return null;
      const place = { left, width: right - left, top: box.staffTop - 22, height: box.staffBottom - box.staffTop + 44 };
      return <div key={bar} data-bar={bar} onClick={onPick ? () => onPick(bar) : undefined} style={place} className={`absolute ${className}`} />;
    });
}
