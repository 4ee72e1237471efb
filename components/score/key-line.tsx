import { memo } from 'react';
import { classNames } from '@/components/ui';
import type { KeyRegion } from '@/lib/harmony/reading';
import { formatKeyForPeople } from '@/lib/theory/key';
import type { SheetGeometry } from './geometry';
import { KEY_LINE, type KeySpan, layKeys } from './lane-model';

interface KeyLineProps {
  readonly geometry: SheetGeometry;
  readonly regions: readonly KeyRegion[];
  /** Opens the region that begins at this tick; absent where keys are not to be changed. */
  readonly onOpen?: ((regionStart: number) => void) | undefined;
}

/** A bracket per region with its key's name, repeated small where a system breaks it. */
export const KeyLine = memo(function KeyLine({ geometry, regions, onOpen }: KeyLineProps) {
  const spans = layKeys(geometry, regions);
  return (
    <>
      <svg aria-hidden="true" className="pointer-events-none absolute inset-0 overflow-visible text-ink-soft" width={geometry.width} height={geometry.height}>
        {spans.map((span) => <path key={`${span.region.start} ${span.system}`} d={bracket(geometry, span)} stroke="currentColor" strokeWidth="1" fill="none" />)}
      </svg>
      {spans.map((span) => (
        <KeyName key={`${span.region.start} ${span.system}`} span={span} until={nextOnSystem(spans, span)} top={laneTop(geometry, span) + KEY_LINE.top} onOpen={onOpen} />
      ))}
    </>
  );
});

function laneTop(geometry: SheetGeometry, span: KeySpan): number {
  return geometry.systems[span.system]?.laneTop ?? 0;
}

/** Under the name: hooks where the region itself begins and ends, none where only the system does. */
function bracket(geometry: SheetGeometry, span: KeySpan): string {
  const y = Math.round(laneTop(geometry, span) + KEY_LINE.height - 3) + 0.5;
  const right = span.right - 4;
  return `${span.begins ? `M${span.x} ${y - 6}V${y}` : `M${span.x} ${y}`}H${right}${span.ends ? `V${y - 6}` : ''}`;
}

/** x where the next region's name begins; a name may reach beyond its region as long as there is none. */
function nextOnSystem(spans: readonly KeySpan[], span: KeySpan): number {
  return spans.find((s) => s.system === span.system && s.x > span.x)?.x ?? Infinity;
}

interface KeyNameProps extends Pick<KeyLineProps, 'onOpen'> {
  readonly span: KeySpan;
  readonly until: number;
  readonly top: number;
}

function KeyName({ span, until, top, onOpen }: KeyNameProps) {
  const name = formatKeyForPeople(span.region.key);
  const look = classNames('absolute truncate px-0.5 text-left font-book italic leading-none', span.begins ? 'text-[16px] text-ink' : 'text-[14.5px] text-ink-soft');
  const style = { left: span.x, top, height: KEY_LINE.height - 4, maxWidth: Number.isFinite(until) ? until - span.x - 2 : undefined };
  if (!onOpen || !span.begins) return <span aria-hidden={!span.begins} className={look} style={style}>{name}</span>;
  return (
    <button type="button" tabIndex={-1} className={classNames(look, 'lane-target overflow-visible! hover:underline')} style={style} title="Change this key" onClick={() => onOpen(span.region.start)}>
      <span className="sr-only">Key: </span>
      <span className="block truncate">{name}</span>
    </button>
  );
}
