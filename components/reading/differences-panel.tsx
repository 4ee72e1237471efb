'use client';

import { Button, Mark, classNames } from '@/components/ui';
import { namePlace } from '@/components/score/beats';
import { NumeralText } from '@/components/score/numeral-text';
import type { Difference } from '@/lib/harmony/differences';
import type { Label } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { equalKeys, formatKeyForPeople } from '@/lib/theory/key';
import { typesetNumeral } from '@/lib/theory/typeset';
import type { Beside } from './use-beside';

interface DifferencesPanelProps {
  readonly beside: Beside;
  readonly score: Score;
  readonly sheet: ConventionSheet;
  /** May write in the desk's own reading. */
  readonly takes: boolean;
}

/** Where two readings differ and how, each to be looked at and taken over. */
export function DifferencesPanel({ beside, score, sheet, takes }: DifferencesPanelProps) {
  const { differences, current, by } = beside;
  return (
    <div className="flex flex-col gap-3">
      <p>
        Beside <strong className="font-medium">{beside.title}</strong>:{' '}
        {differences.length === 0 ? 'the two readings are alike.' : differences.length === 1 ? 'one difference.' : `${differences.length} differences.`}
      </p>
      {differences.length > 0 ? (
        <div className="flex gap-2">
          <Button size="small" onClick={() => beside.step(-1)}>Before</Button>
          <Button size="small" onClick={() => beside.step(1)}>Next</Button>
          {takes ? <Button size="small" kind="primary" disabled={!current} onClick={() => beside.take(current)}>Take theirs over</Button> : null}
        </div>
      ) : (
        <Mark tone="settled" shape="check">no difference is left</Mark>
      )}
      <ol className="flex flex-col">
        {differences.map((difference) => (
          <li key={`${difference.mine.id} ${difference.theirs.id} ${difference.start}`} className="border-b border-rule">
            <button
              type="button"
              aria-current={difference === current ? 'true' : undefined}
              className={classNames('flex w-full flex-col gap-0.5 px-1.5 py-2 text-left hover:bg-bench', difference === current && 'bg-selection')}
              onClick={() => beside.goTo(difference)}
            >
              <span className="flex flex-wrap items-baseline gap-x-2">
                <span className="text-small text-ink-soft">{namePlace(score, difference.start)}</span>
                <Mark tone="eye" shape="triangle">{nameDifference(difference)}</Mark>
              </span>
              <span className="flex flex-wrap items-baseline gap-x-2">
                <Side label={difference.mine} other={difference.theirs} sheet={sheet} />
                <span className="text-small text-ink-soft">against {by}</span>
                <Side label={difference.theirs} other={difference.mine} sheet={sheet} />
              </span>
              {difference.kinds.includes('boundary') ? <span className="text-small text-ink-soft">{sayBoundary(score, difference)}</span> : null}
            </button>
          </li>
        ))}
      </ol>
    </div>
  );
}

function Side({ label, other, sheet }: { readonly label: Label; readonly other: Label; readonly sheet: ConventionSheet }) {
  return (
    <span className="inline-flex items-baseline gap-1.5">
      <span className="text-lead">{label.numeral ? <NumeralText parts={typesetNumeral(label.numeral, label.key.mode, sheet)} /> : <i className="text-base">a blank</i>}</span>
      {equalKeys(label.key, other.key) ? null : <span className="text-small">in {formatKeyForPeople(label.key)}</span>}
    </span>
  );
}

const KIND_NAMES = {
  root: 'another root',
  quality: 'another kind of chord',
  inversion: 'another inversion',
  frame: 'another frame',
  name: 'another name for the same notes',
  boundary: 'another boundary',
  blank: 'one is blank',
} as const satisfies Record<Difference['kinds'][number], string>;

/** `another kind of chord, another inversion`. */
export function nameDifference({ kinds, mine, theirs }: Difference): string {
  const names = kinds.map((kind) => (kind === 'frame' ? nameFrame(mine, theirs) : KIND_NAMES[kind]));
  return names.join(', ');
}

function nameFrame(mine: Label, theirs: Label): string {
  const isApplied = (label: Label) => (label.numeral?.applied.length ?? 0) > 0;
  if (isApplied(mine) === isApplied(theirs)) return equalKeys(mine.key, theirs.key) ? KIND_NAMES.frame : 'another key';
  return isApplied(mine) ? 'another frame: tonicised against modulated' : 'another frame: modulated against tonicised';
}

function sayBoundary(score: Score, { mine, theirs }: Difference): string {
  if (mine.start === theirs.start) return 'They begin together and end apart.';
  return `Yours begins at ${namePlace(score, mine.start)}, theirs at ${namePlace(score, theirs.start)}.`;
}
