import { type Draft, type WrittenTime, quartersOfMetre } from './draft';
import { refuse } from './refusal';
import { type Bar, type TimeSignature, ticks } from './score';

/** Exporters round tuplets, so a bar's sum may miss its metre by a hair: up to 1/24 of a quarter is taken for rounding. */
export const ROUNDING_PER_QUARTER = 24;

/** A bar while it is laid out: with the length its metre asks for, null without a written metre. */
interface LaidBar extends Omit<Bar, 'offset'> {
  readonly nominal: number | null;
}

/** Lays the draft's bars end to end. A bar is as long as its longest part; an empty one as its metre asks. */
export function layOutBars(draft: Draft): Bar[] {
  const metres = metresByBar(draft);
  const laid: LaidBar[] = [];
  let start = 0;
  draft.bars.forEach(({ number, implicit, length }, index) => {
    const metre = metres[index];
    const nominal = metre === null ? null : nominalTicks(draft, metre ?? COMMON_TIME);
    const actual = lengthOf(draft, length, nominal);
    laid.push({ index, number, implicit, start: ticks(start), length: ticks(actual), time: timeAt(metre, start), nominal: metre ? nominal : null });
    start += actual;
  });
  if (!Number.isSafeInteger(start)) refuse('bad_duration', 'The score is too long to be counted exactly. Export the file again.', { element: 'duration' });
  return withOffsets(laid);
}

type Metre = WrittenTime['metre'];
const COMMON_TIME = { beats: [4], beatType: 4 };

function nominalTicks(draft: Draft, metre: NonNullable<Metre>): number {
  return draft.ticksOf(quartersOfMetre(metre), 0);
}

function lengthOf(draft: Draft, written: number, nominal: number | null): number {
  if (written === 0) return nominal ?? 4 * draft.ticksPerQuarter;
  const rounded = nominal !== null && Math.abs(written - nominal) * ROUNDING_PER_QUARTER <= draft.ticksPerQuarter;
  return rounded ? nominal : written;
}

function timeAt(metre: Metre | undefined, start: number): TimeSignature | null {
  return metre ? { ...metre, start: ticks(start) } : null;
}

/** The metre in force in each bar: null for senza misura, undefined before any is written. A change inside a bar counts from the next one. */
function metresByBar(draft: Draft): (Metre | undefined)[] {
  const first = draft.times[0]?.part;
  const changes = draft.times.filter(({ part }) => part === first);
  let metre: Metre | undefined;
  let next = 0;
  return draft.bars.map((_, bar) => {
    const before = (change: WrittenTime) => change.bar < bar || (change.bar === bar && change.at === 0);
    for (let change = changes[next]; change && before(change); change = changes[next]) {
      metre = change.metre;
      next += 1;
    }
    return metre;
  });
}

/** How far into its metre each bar begins: an upbeat at the end of it, the rest of a split bar where the first part ended. */
function withOffsets(laid: readonly LaidBar[]): Bar[] {
  const bars: Bar[] = [];
  for (const { nominal, ...bar } of laid) {
    const before = bars[bar.index - 1];
    bars.push({ ...bar, offset: ticks(nominal === null ? 0 : offsetOf(bar, nominal, before)) });
  }
  return bars;
}

function offsetOf(bar: Omit<Bar, 'offset'>, nominal: number, before: Bar | undefined): number {
  const missing = nominal - bar.length;
  if (missing <= 0) return 0;
  if (!before) return missing;
  const filled = before.offset + before.length;
  const continues = before.length < nominal && filled < nominal;
  if (continues && (bar.implicit ? filled <= missing : filled === missing)) return filled;
  return bar.implicit ? missing : 0;
}
