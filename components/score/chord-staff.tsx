import type { Role } from '@/lib/theory/chord';
import { type Fifths, LETTERS, alterOf, formatPitchClassForPeople, letterOf } from '@/lib/theory/pitch';

interface StaffTone {
  readonly fifths: Fifths;
  readonly role: Role;
  /** Drawn hollow and named as missing from the score. */
  readonly missing?: boolean;
}

const LINE_GAP = 8;
const TOP = 34;
/** Diatonic number of the top line, F5, and of the middle, where the stack is hung. */
const TOP_STEP = 7 * 5 + LETTERS.indexOf('F');

/** A chord stacked from its bass up on a small treble staff, each note with its name and its role. */
export function ChordStaff({ tones }: { readonly tones: readonly StaffTone[] }) {
  const steps = stack(tones);
  const names = tones.map((t) => `${formatPitchClassForPeople(t.fifths)} ${t.role}${t.missing ? ', not in the score' : ''}`);
  const lowest = Math.min(...steps);
  const height = Math.max(TOP + 4 * LINE_GAP + 26, y(lowest) + 18);
  const width = 128 + tones.length * 44;
  return (
    <svg role="img" aria-label={`From the bass up: ${names.join('; ')}`} viewBox={`0 0 ${width} ${height}`} className="w-full max-w-sm text-ink" style={{ maxHeight: '8.5rem' }}>
      {[0, 1, 2, 3, 4].map((line) => <path key={line} d={`M2 ${TOP + line * LINE_GAP}H${width - 2}`} stroke="currentColor" strokeWidth="0.8" className="text-rule-strong" />)}
      <Clef />
      {tones.map((tone, i) => <Tone key={`${tone.fifths} ${i}`} tone={tone} step={steps[i] as number} x={70 + i * 44} />)}
      <g>
        {tones.map((tone, i) => <Head key={tone.fifths} step={steps[i] as number} x={width - 34} side={isSecond(steps, i) ? 1 : 0} hollow={tone.missing ?? false} />)}
      </g>
    </svg>
  );
}

/** Diatonic numbers upwards from a bass between C4 and B4, each tone over the one before. */
function stack(tones: readonly StaffTone[]): number[] {
  let last = 7 * 4 - 1;
  return tones.map((tone) => {
    const letter = LETTERS.indexOf(letterOf(tone.fifths));
    const step = letter + 7 * Math.ceil((last + 1 - letter) / 7);
    last = step;
    return step;
  });
}

function isSecond(steps: readonly number[], i: number): boolean {
  return i > 0 && (steps[i] as number) - (steps[i - 1] as number) === 1;
}

function y(step: number): number {
  return TOP + ((TOP_STEP - step) * LINE_GAP) / 2;
}

/** A treble clef in outline: a spiral round the second line and a stem. */
function Clef() {
  const g = TOP + 3 * LINE_GAP;
  return (
    <path
      d={`M16 ${g}c0-4 6-4 6 .5s-8 6-11 1 2-12 8-18 3-17 0-17-5 8-4 16l4 28c1 7-6 8-7 4`}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      strokeLinecap="round"
    />
  );
}

function Tone({ tone, step, x }: { readonly tone: StaffTone; readonly step: number; readonly x: number }) {
  const sign = formatPitchClassForPeople(tone.fifths).slice(1);
  return (
    <g className={tone.missing ? 'text-madder' : undefined}>
      {alterOf(tone.fifths) === 0 ? null : <text x={x - 9} y={y(step) + 5} textAnchor="end" fontSize="17" className="fill-current font-book">{sign}</text>}
      <Head step={step} x={x} side={0} hollow={tone.missing ?? false} />
      <text x={x} y={14} textAnchor="middle" fontSize="13" className="fill-current font-book">{formatPitchClassForPeople(tone.fifths)}</text>
      <text x={x} y={25} textAnchor="middle" fontSize="9.5" className="fill-ink-soft font-sans">{tone.role}</text>
    </g>
  );
}

function Head({ step, x, side, hollow }: { readonly step: number; readonly x: number; readonly side: 0 | 1; readonly hollow: boolean }) {
  const at = y(step);
  const ledgers = step <= 28 ? [28] : step >= 40 ? Array.from({ length: Math.floor((step - 38) / 2) }, (_, i) => 40 + 2 * i) : [];
  return (
    <g stroke="currentColor" className={hollow ? 'text-madder' : undefined}>
      {ledgers.map((line) => <path key={line} d={`M${x - 9} ${y(line)}H${x + 9}`} strokeWidth="0.9" />)}
      <ellipse cx={x + side * 9} cy={at} rx="5" ry="3.6" transform={`rotate(-18 ${x + side * 9} ${at})`} fill={hollow ? 'none' : 'currentColor'} strokeWidth="1.2" />
    </g>
  );
}
