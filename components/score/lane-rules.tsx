import { memo } from 'react';
import type { SheetGeometry } from './geometry';
import { type LaneModel, NUMERAL_LINE } from './lane-model';

/** Shorter continuation lines than this say nothing. */
const SHORTEST = 12;

/** The hairlines of the numeral line: a tick up to each label's note, and a line for as long as the label lasts. */
export const LaneRules = memo(function LaneRules({ geometry, model }: { readonly geometry: SheetGeometry; readonly model: LaneModel }) {
  const middle = (system: number, row: number) =>
    (geometry.systems[system]?.laneTop ?? 0) + NUMERAL_LINE.top + row * NUMERAL_LINE.rowHeight + 16.5;
  return (
    <svg aria-hidden="true" className="pointer-events-none absolute inset-0 overflow-visible text-rule-strong" width={geometry.width} height={geometry.height}>
      <g stroke="currentColor" strokeWidth="0.9" fill="none">
        {model.labels.map(({ label, system, placed, right, noteX }) => {
          const y = middle(system, placed.row);
          const from = placed.left + placed.width * placed.scale + 4;
          const to = Math.min(right - 5, nextInRow(model, system, placed.row, placed.left));
          const tickTop = (geometry.systems[system]?.laneTop ?? 0) + NUMERAL_LINE.top - 4;
          return (
            <g key={label.id}>
              <path d={`M${noteX + 6} ${tickTop}V${placed.row === 0 ? tickTop + 4 : y - 16}`} strokeWidth={placed.row === 0 ? 0.9 : 0.6} />
              {to - from > SHORTEST ? <path d={`M${from} ${y}H${to}`} strokeDasharray="1 2.5" /> : null}
            </g>
          );
        })}
        {model.continuations.map((piece) => (
          <path key={`${piece.labelId} ${piece.system}`} d={`M${piece.x + 2} ${middle(piece.system, 0)}H${Math.min(piece.right - 5, nextInRow(model, piece.system, 0, 0))}`} strokeDasharray="1 2.5" />
        ))}
      </g>
    </svg>
  );
});

/** Where the next label of a row begins, less a little air. */
function nextInRow(model: LaneModel, system: number, row: number, after: number): number {
  const next = model.labels.find((l) => l.system === system && l.placed.row === row && l.placed.left > after);
  return next ? next.placed.left - 5 : Infinity;
}
