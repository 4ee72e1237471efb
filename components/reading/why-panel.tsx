'use client';

import { Mark, type Shape, type Tone, classNames } from '@/components/ui';
import { ChordStaff } from '@/components/score/chord-staff';
import { namePlace } from '@/components/score/beats';
import { type Label, NON_CHORD_KINDS, type NonChordKind, type Resolution, type TendencyTone, type Term, type Why } from '@/lib/harmony/reading';
import type { Score } from '@/lib/score/score';
import { formatPitchClassForPeople } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';
import { TONE_WORDS } from './label-words';

interface WhyPanelProps {
  readonly score: Score;
  readonly label: Label;
  readonly why: Why | null;
  /** Says what kind a note left over is; null takes it back. Absent where nothing may be written. */
  readonly onMark?: ((noteId: number, kind: NonChordKind | null) => void) | undefined;
}

/** The evidence for a label: what it spells, what it leaves over, where its tendency tones go, what speaks for and against. */
export function WhyPanel({ score, label, why, onMark }: WhyPanelProps) {
  if (!label.numeral) return <p className="text-ink-soft">A blank. Write a numeral to see what it spells and what it explains.</p>;
  const missing = new Set(why?.missing ?? []);
  const tones = spellNumeral(label.key, label.numeral).tones.map((tone) => ({ ...tone, missing: missing.has(tone.role) }));
  return (
    <div className="flex flex-col gap-4">
      <ChordStaff tones={tones} />
      {why ? (
        <>
          <Sentences sentences={why.sentences} />
          <LeftOver score={score} label={label} why={why} onMark={onMark} />
          <Tendencies score={score} tones={why.tendencyTones} />
          <Terms termsFor={why.termsFor} termsAgainst={why.termsAgainst} />
        </>
      ) : null}
    </div>
  );
}

function Part({ title, children }: { readonly title: string; readonly children: React.ReactNode }) {
  return (
    <section>
      <h3 className="caps mb-1 text-small text-ink-soft">{title}</h3>
      {children}
    </section>
  );
}

function Sentences({ sentences }: { readonly sentences: readonly string[] }) {
  if (sentences.length === 0) return null;
  return (
    <div className="flex flex-col gap-1.5">
      {sentences.map((sentence) => <p key={sentence}>{sentence}</p>)}
    </div>
  );
}

interface LeftOverProps {
  readonly score: Score;
  readonly label: Label;
  readonly why: Why;
  readonly onMark: WhyPanelProps['onMark'];
}

function LeftOver({ score, label, why, onMark }: LeftOverProps) {
  if (why.nonChordTones.length === 0) return null;
  return (
    <Part title="Left over">
      <ul className="flex flex-col gap-0.5" data-left-over>
        {why.nonChordTones.map((tone) => {
          const byHand = label.tones?.some(({ noteId }) => noteId === tone.noteId) ?? false;
          const place = placeOfNote(score, tone.noteId);
          const name = formatPitchClassForPeople(tone.pitch.fifths);
          return (
            <li key={tone.noteId} className="flex flex-wrap items-baseline gap-x-2">
              <span className="font-book text-lead leading-none">{name}</span>
              {onMark ? (
                <select
                  aria-label={`${name}, ${place}: kind`}
                  className={classNames('min-h-6 max-w-44 border-b border-rule bg-transparent text-base', tone.kind === 'other' && 'text-madder')}
                  value={tone.kind}
                  onChange={(event) => onMark(tone.noteId, event.target.value === '' ? null : (event.target.value as NonChordKind))}
                >
                  {NON_CHORD_KINDS.map((kind) => <option key={kind} value={kind}>{TONE_WORDS[kind]}</option>)}
                  {byHand ? <option value="">as first proposed</option> : null}
                </select>
              ) : (
                <span className={tone.kind === 'other' ? 'text-madder' : undefined}>{TONE_WORDS[tone.kind]}</span>
              )}
              <span className="text-small text-ink-soft">{place}{byHand ? ', named by hand' : ''}</span>
            </li>
          );
        })}
      </ul>
    </Part>
  );
}

function placeOfNote(score: Score, noteId: number): string {
  const note = score.notes.find((n) => n.id === noteId);
  return note ? `${partName(score, note.part)}${namePlace(score, note.start)}` : '';
}

function partName(score: Score, part: number): string {
  const name = score.parts.length > 1 ? score.parts[part]?.name : '';
  return name ? `${name}, ` : '';
}

const RESOLUTION_LOOKS = {
  'as-expected': { shape: 'check', tone: 'settled', words: 'resolves as expected' },
  'in-another-voice': { shape: 'half', tone: 'open', words: 'resolves in another voice' },
  delayed: { shape: 'half', tone: 'open', words: 'resolves later' },
  irregular: { shape: 'triangle', tone: 'eye', words: 'goes another way' },
  unresolved: { shape: 'cross', tone: 'eye', words: 'does not resolve' },
} as const satisfies Record<Resolution, { shape: Shape; tone: Tone; words: string }>;

const TENDENCY_WORDS: Readonly<Record<string, string>> = { 'leading-tone': 'leading tone', altered: 'altered note' };

function Tendencies({ score, tones }: { readonly score: Score; readonly tones: readonly TendencyTone[] }) {
  if (tones.length === 0) return null;
  return (
    <Part title="Tendency tones">
      <ul className="flex flex-col gap-1.5">
        {tones.map((tone) => {
          const look = RESOLUTION_LOOKS[tone.resolution];
          const wants = formatPitchClassForPeople(tone.expected.fifths);
          const went = tone.went ? formatPitchClassForPeople(tone.went.fifths) : null;
          return (
            <li key={tone.noteId}>
              <p>
                <span className="font-book text-lead leading-none">{formatPitchClassForPeople(tone.pitch.fifths)}</span> {TENDENCY_WORDS[tone.kind] ?? tone.kind}, wants {wants}
                {went && went !== wants ? <>, goes to {went}</> : null}
              </p>
              <p className="flex flex-wrap items-baseline gap-x-2 text-small">
                <Mark tone={look.tone} shape={look.shape}>{look.words}</Mark>
                <span className="text-ink-soft">{placeOfNote(score, tone.noteId)}</span>
              </p>
            </li>
          );
        })}
      </ul>
    </Part>
  );
}

function Terms({ termsFor, termsAgainst }: { readonly termsFor: readonly Term[]; readonly termsAgainst: readonly Term[] }) {
  const most = Math.max(0.01, ...[...termsFor, ...termsAgainst].map((t) => Math.abs(t.weight)));
  if (termsFor.length + termsAgainst.length === 0) return null;
  return (
    <details>
      <summary className="caps text-small text-ink-soft">What was weighed</summary>
      <ul className="mt-1 flex flex-col gap-1">
        {[...termsFor, ...termsAgainst].map((term) => (
          <li key={term.name + term.sentence} className="grid grid-cols-[4rem_1fr] items-center gap-2 text-small">
            <span aria-hidden="true" className="relative h-2 bg-bench">
              <span className={term.weight >= 0 ? 'absolute inset-y-0 left-1/2 bg-verdigris' : 'absolute inset-y-0 right-1/2 bg-madder'} style={{ width: `${(50 * Math.abs(term.weight)) / most}%` }} />
            </span>
            <span>{term.weight >= 0 ? 'For: ' : 'Against: '}{term.sentence}</span>
          </li>
        ))}
      </ul>
    </details>
  );
}
