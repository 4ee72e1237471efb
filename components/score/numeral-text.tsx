import { type Key, formatKeyForPeople } from '@/lib/theory/key';
import { layoutNumeral } from '@/lib/theory/numeral-layout';
import { glyphsOf, measureRun } from '@/lib/theory/numeral-metrics';
import type { NumeralParts } from '@/lib/theory/typeset';

/** The box a numeral stands in, in ems above and below its baseline: the same for all, so that lines keep their pitch. */
const ASCENT = 0.86;
const DESCENT = 0.26;
/** Units of the drawing to the em. */
const EM = 100;

interface NumeralTextProps {
  readonly parts: NumeralParts;
  readonly className?: string;
  /** The name is said by what surrounds it. */
  readonly decorative?: boolean;
}

/**
 * The one way a numeral is set on screen: accidental, letters, mark, stacked small figures, targets. It is as large as the
 * text around it and takes its colour; a screen reader hears it in words.
 */
export function NumeralText({ parts, className = '', decorative = false }: NumeralTextProps) {
  const { width } = layoutNumeral(parts, measureRun);
  return (
    <svg
      {...(decorative ? { 'aria-hidden': true } : { role: 'img', 'aria-label': parts.spoken })}
      width={`${round(width)}em`}
      height={`${ASCENT + DESCENT}em`}
      viewBox={`0 ${-ASCENT * EM} ${round(width * EM)} ${(ASCENT + DESCENT) * EM}`}
      className={`inline-block overflow-visible align-[-0.26em] ${className}`}
      data-numeral={parts.text}
    >
      <NumeralGlyphs parts={parts} x={0} y={0} size={EM} />
    </svg>
  );
}

interface NumeralGlyphsProps {
  readonly parts: NumeralParts;
  /** Left end of the baseline, in the units of the surrounding drawing. */
  readonly x: number;
  readonly y: number;
  /** The em of the letters, in the same units. */
  readonly size: number;
}

/** The same numeral inside an SVG of one's own; name it there. */
export function NumeralGlyphs({ parts, x, y, size }: NumeralGlyphsProps) {
  const { runs } = layoutNumeral(parts, measureRun);
  return (
    <g aria-hidden="true" className="fill-current font-book font-medium [font-kerning:none]">
      {runs.flatMap((run) => glyphsOf(run)).map((glyph, place) => (
        <text
          key={place}
          x={round(x + glyph.x * size)}
          y={round(y + glyph.y * size)}
          fontSize={round(glyph.size * size)}
          className={glyph.small ? '[font-feature-settings:"dnom"]' : '[font-variant-numeric:lining-nums]'}
        >
          {glyph.text}
        </text>
      ))}
    </g>
  );
}

function round(value: number): number {
  return Math.round(value * 1000) / 1000;
}

/** A key as printed, `E♭ major` or `c♯ minor`, and as said, “E flat major”. */
export function KeyName({ keyValue, className }: { readonly keyValue: Key; readonly className?: string }) {
  const printed = formatKeyForPeople(keyValue);
  if (!/[♭♯]/u.test(printed)) return <span className={className}>{printed}</span>;
  return (
    <span className={className}>
      <span aria-hidden="true">{printed}</span>
      <span className="sr-only">{speakKey(printed)}</span>
    </span>
  );
}

function speakKey(printed: string): string {
  return printed.replace(/♭♭|𝄫/gu, ' double flat').replace(/♭/gu, ' flat').replace(/♯/gu, ' sharp').replace(/𝄪/gu, ' double sharp');
}
