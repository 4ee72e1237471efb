import { type SheetGeometry, cutSpan } from './geometry';

interface SpanWashProps {
  readonly geometry: SheetGeometry;
  readonly start: number;
  readonly end: number;
}

/** The band over the staves for as long as the selection lasts, and a line up to the note it begins with. Lies under the notes. */
export function SpanWash({ geometry, start, end }: SpanWashProps) {
  return (
    <svg aria-hidden="true" className="pointer-events-none absolute inset-0 overflow-visible" width={geometry.width} height={geometry.height}>
      {cutSpan(geometry, start, end).map((piece) => {
        const system = geometry.systems[piece.system];
        if (!system) return null;
        const top = system.staffTop - 14;
        return (
          <g key={piece.system}>
            <rect x={piece.x - 3} y={top} width={Math.max(10, piece.right - piece.x)} height={system.laneTop - top} className="fill-selection" />
            {piece.begins ? <path d={`M${piece.x - 3} ${top}V${system.laneTop + 27}`} className="stroke-rule-strong" strokeWidth="1" /> : null}
          </g>
        );
      })}
    </svg>
  );
}
