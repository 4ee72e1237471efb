'use client';

import { useMemo } from 'react';
import { nameBar, nameBeat } from '@/components/score/beats';
import { lookOf } from '@/components/score/label-look';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { formatKeyForPeople } from '@/lib/theory/key';
import { formatPitchClassForPeople } from '@/lib/theory/pitch';
import { speakLabel } from './label-words';

interface ScoreTableProps {
  readonly score: Score;
  readonly firstBar: number;
  readonly lastBar: number;
  readonly reading: Reading;
  readonly sheet: ConventionSheet;
}

/** The score and its labels as one table per bar: beat, notes from below, label, state. For those who do not see the page. */
export function ScoreTable({ score, firstBar, lastBar, reading, sheet }: ScoreTableProps) {
  return (
    <section aria-label="The score as tables" className="flex flex-wrap gap-6">
      {score.bars.slice(firstBar, lastBar + 1).map((bar) => {
        const labels = reading.labels.filter((l) => l.start >= bar.start && l.start < bar.start + bar.length);
        return (
          <table key={bar.index} className="text-small">
            <caption className="text-left font-medium">{nameBar(bar).replace(/^./, (c) => c.toUpperCase())}</caption>
            <thead>
              <tr>{['Beat', 'Notes', 'Label', 'Key', 'State'].map((head) => <th key={head} scope="col" className="caps pr-3 text-left text-ink-soft">{head}</th>)}</tr>
            </thead>
            <tbody>
              {labels.map((label) => <LabelRow key={label.id} score={score} label={label} sheet={sheet} />)}
              {labels.length === 0 ? <tr><td colSpan={5}>The label before goes on.</td></tr> : null}
            </tbody>
          </table>
        );
      })}
    </section>
  );
}

function LabelRow({ score, label, sheet }: { readonly score: Score; readonly label: Label; readonly sheet: ConventionSheet }) {
  const notes = useMemo(() => notesOf(score, label), [score, label]);
  return (
    <tr>
      <td className="pr-3">{nameBeat(score, label.start)}</td>
      <td className="pr-3">{notes}</td>
      <td className="pr-3">{speakLabel(label, sheet)}</td>
      <td className="pr-3">{formatKeyForPeople(label.key)}</td>
      <td>{lookOf(label).word}</td>
    </tr>
  );
}

/** Names of what sounds within a label, from the lowest up, each once. */
function notesOf(score: Score, label: Label): string {
  const heard = score.notes.filter((n) => n.start < label.end && n.start + n.duration > label.start);
  const sorted = heard.map((n) => n.pitch).sort((a, b) => a.octave - b.octave || a.fifths - b.fifths);
  return [...new Set(sorted.map((p) => formatPitchClassForPeople(p.fifths)))].join(' ');
}
