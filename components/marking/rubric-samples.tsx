'use client';

import { useMemo } from 'react';
import { Row, Table, Td, Th } from '@/components/ui';
import { type Setting, type SpanMark, compareWithKey } from '@/lib/marking/compare-with-key';
import type { Framed } from '@/lib/marking/key-reading';
import { formatPoints } from '@/lib/marking/points';
import type { Rubric } from '@/lib/marking/rubric';
import { DEFAULT_CONVENTIONS, type ConventionSheet } from '@/lib/theory/conventions';
import type { Key } from '@/lib/theory/key';
import type { Label, Reading } from '@/lib/harmony/reading';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { fifths } from '@/lib/theory/pitch';
import { ChordName } from './chord-name';
import { VerdictMark } from './verdict-mark';

const C_MAJOR: Key = { tonic: fifths(0), mode: 'major' };
const G_MAJOR: Key = { tonic: fifths(1), mode: 'major' };

/** Answers that show what a rubric does: the key's label, then what a student wrote, both as the default sheet spells them. */
const SAMPLES: readonly { readonly key: string; readonly answer: string; readonly in?: Key }[] = [
  { key: 'V7', answer: 'V' },
  { key: 'ii65', answer: 'ii7' },
  { key: 'ii6', answer: 'II6' },
  { key: 'V7/V', answer: 'II7' },
  { key: 'viio7/V', answer: 'viio7/ii' },
  { key: 'viiø7', answer: 'viio7' },
  { key: 'bVI', answer: 'VI' },
  { key: 'Cad64', answer: 'I64' },
  { key: 'V7/V', answer: 'V7', in: G_MAJOR },
];

interface RubricSamplesProps {
  readonly rubric: Rubric;
  readonly sheet: ConventionSheet;
  readonly keysGiven: boolean;
}

/** What a rubric gives for typical answers, as it is being changed. */
export function RubricSamples({ rubric, sheet, keysGiven }: RubricSamplesProps) {
  const rows = useMemo(() => SAMPLES.filter((sample) => !keysGiven || !sample.in).map((sample) => sampleOf(sample, rubric, keysGiven)), [rubric, keysGiven]);
  return (
    <Table caption="What this rubric gives for typical answers, in C major" captionShown>
      <thead>
        <Row>
          <Th>Key</Th>
          <Th>Answer</Th>
          <Th>Verdict</Th>
          <Th className="text-right">Points</Th>
        </Row>
      </thead>
      <tbody>
        {rows.map(({ keyed, answered, mark }, place) => (
          <Row key={place}>
            <Td><ChordName chord={keyed} sheet={sheet} /></Td>
            <Td><ChordName chord={answered} sheet={sheet} keyShown={answered.key !== C_MAJOR} /></Td>
            <Td><VerdictMark verdict={mark.verdict} /></Td>
            <Td className="tabular text-right whitespace-nowrap">{formatPoints(mark.points)} of {formatPoints(mark.maxPoints)}</Td>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

function sampleOf(sample: (typeof SAMPLES)[number], rubric: Rubric, keysGiven: boolean): { keyed: Framed; answered: Framed; mark: SpanMark } {
  const keyed = framed(sample.key, C_MAJOR);
  const answered = framed(sample.answer, sample.in ?? C_MAJOR);
  const setting: Setting = { segmentation: 'given', keysGiven, ticksPerQuarter: 1 };
  const key = { ...readingOf(keyed), labels: readingOf(keyed).labels.map((label) => ({ ...label, asked: label.id === '0', alternatives: [], points: null })) };
  const [mark] = compareWithKey(key, readingOf(answered), rubric, setting);
  if (!mark) throw new Error('the first label is asked');
  return { keyed, answered, mark };
}

function framed(text: string, key: Key): Framed {
  const numeral = parseNumeral(text, key.mode, DEFAULT_CONVENTIONS);
  if (!numeral.ok) throw new Error('the samples are numerals', { cause: numeral.error });
  return { key, numeral: numeral.value };
}

/** The chord, and the dominant after it: what a cadential six-four needs. */
function readingOf(chord: Framed): Reading {
  const dominant = framed('V7', C_MAJOR);
  const at = (tick: number) => tick as Label['start'];
  const label = ({ key, numeral }: Framed, place: number): Label => ({
    id: String(place), start: at(place), end: at(place + 1), key, numeral, state: 'changed', certainty: null, others: [],
  });
  return { start: at(0), end: at(2), regions: [{ start: at(0), end: at(2), key: C_MAJOR }], labels: [label(chord, 0), label(dominant, 1)] };
}
