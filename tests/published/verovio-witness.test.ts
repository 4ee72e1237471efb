import { beforeAll, describe, expect, it } from 'vitest';
import { unwrap } from '@/lib/result';
import { openScoreFile } from '@/lib/score/open-score-file';
import { performedBars } from '@/lib/score/performed-bars';
import { readScoreText } from '@/lib/score/read-score';
import type { Score } from '@/lib/score/score';
import { corpusScores, hasCorpus, hasSuite, readCorpusScore, readSuiteFile, suiteFiles } from '../support/shared';
import { Witness } from '../support/witness';

/**
 * Source: the verovio package (an engraving library), as an independent reader of the same files.
 *
 * Where the two differ, by reason. The numbers are the starts and releases that differ; they may only shrink.
 */
const TIE_OVER_GAP = 'a broken chord tied into a full one: it ends the note earlier, by the gap between the tied notes';
const TIE_ACROSS_VOICES = 'a tie from one voice into another: it strikes the second note again';
const SPELLING = 'a tie from a G sharp to an A flat: we keep two notes, since spelling counts';
const MICROTONES = 'a quarter tone is rounded to the other side (ours: to the one nearer the natural)';
const TUPLETS = 'it takes lengths from type and tuplet where we take the duration element, which sounds by the specification';
const ACCIDENTAL = 'it takes the printed accidental or accidental mark, we the alter element, which sounds by the specification';
const TREMOLO = 'it performs the tremolo between two notes as many short ones';
const BAR_LENGTH = 'a bar overfull for its time signature: it goes by the note types, we by the durations';
const UNPITCHED = 'it performs unpitched notes, which are no tones';
const TRANSPOSITION = 'it keeps the first transposition of the part when it changes';
const UNENDED_TIE = 'it joins notes though the second does not end the tie';
const TABLATURE = 'it takes pitches from the strings and frets, we from the pitch element';

const KNOWN_SUITE: Readonly<Record<string, readonly [number, string]>> = {
  '01d-Pitches-Microtones.xml': [16, MICROTONES],
  '01f-Pitches-ParenthesizedMicrotoneAccidentals.xml': [32, MICROTONES],
  '23c-Tuplet-Display-NonStandard.xml': [62, TUPLETS],
  '23d-Tuplets-Nested.xml': [16, TUPLETS],
  '23f-Tuplets-DurationButNoBracket.xml': [60, TUPLETS],
  '32a-Notations.xml': [68, ACCIDENTAL],
  '32c-MultipleNotationChildren.xml': [12, ACCIDENTAL],
  '33a-Spanners.xml': [18, TREMOLO],
  '33e-Spanners-OctaveShifts-InvalidSize.xml': [10, BAR_LENGTH],
  '33i-Ties-NotEnded.xml': [4, UNENDED_TIE],
  '41c-StaffGroups.xml': [2, UNPITCHED],
  '71e-TabStaves.xml': [124, TABLATURE],
  '72c-TransposingInstruments-Change.xml': [8, TRANSPOSITION],
  '73a-Percussion.xml': [12, UNPITCHED],
  '74a-FiguredBass.xml': [6, TUPLETS],
};

const KNOWN_CORPUS: Readonly<Record<string, readonly [number, string]>> = {
  'lied-brahms-op48-3-liebesklage-des-madchens': [2, TIE_ACROSS_VOICES],
  'lied-chausson-op2-7-le-colibri': [2, TIE_ACROSS_VOICES],
  'lied-jaell-4-melodies-1-a-toi': [4, TIE_ACROSS_VOICES],
  'lied-lang-op26-1-wiegenlied': [8, TIE_OVER_GAP],
  'lied-schumann-op13-6-die-stille-lotosblume': [2, TIE_ACROSS_VOICES],
  'lied-schumann-op42-3-ich-kanns-nicht-fassen': [2, TIE_OVER_GAP],
  'lied-schumann-op48-01-im-wunderschonen-monat': [34, TIE_OVER_GAP],
  'lied-schumann-op48-05-ich-will-meine-seele': [2, TIE_OVER_GAP],
  'lied-schumann-op48-08-und-wusstens-die-blumen': [2, TIE_OVER_GAP],
  'lied-schumann-op48-10-hor-ich-das-liedchen': [4, TIE_OVER_GAP],
  'lied-schumann-op48-15-aus-alten-marchen-winkt': [2, TIE_ACROSS_VOICES],
  'lied-schumann-op48-16-die-alten-bosen-lieder': [2, SPELLING],
};

/** Refused by us: see tests/published/musicxml-suite.test.ts. */
const REFUSED = ['11b-TimeSignatures-NoTime.xml', '32ad-Notations5.musicxml'];

/** How many notes sound when the bars are played in `performedBars`' order. */
function countPlayed(score: Score): number {
  const startsIn = score.bars.map(({ start, length }) => score.notes.filter((note) => note.start >= start && note.start < start + length).length);
  return performedBars(score).reduce((sum, bar) => sum + (startsIn[bar] ?? 0), 0);
}

let witness: Witness;
beforeAll(async () => {
  witness = await Witness.create();
});

function differencesOf(bytes: Uint8Array): string[] | undefined {
  const file = openScoreFile(bytes);
  const score = file.ok ? readScoreText(file.value.xml) : file;
  if (!file.ok || !score.ok) throw new Error('refused', { cause: score });
  return witness.differences(file.value.xml, score.value);
}

function countsOf(names: readonly string[], read: (name: string) => Uint8Array, known: Readonly<Record<string, readonly [number, string]>>): string[] {
  return names.flatMap((name) => {
    const found = differencesOf(read(name));
    if (found === undefined) return [`${name}: the witness cannot load it`];
    return found.length > (known[name]?.[0] ?? 0) ? [`${name}: ${found.slice(0, 5).join(', ')} (${found.length} in all)`] : [];
  });
}

describe('the witness hears the same notes at the same times', () => {
  it.skipIf(!hasSuite)('in every file of the suite that we read, but for the listed differences', { timeout: 300_000 }, () => {
    const names = suiteFiles().filter((name) => !REFUSED.includes(name));
    expect(names.length).toBe(148);
    expect(countsOf(names, readSuiteFile, KNOWN_SUITE)).toEqual([]);
  });

  it.skipIf(!hasCorpus)('in every score of the development corpus, but for the listed differences', { timeout: 600_000 }, () => {
    expect(countsOf(corpusScores(), readCorpusScore, KNOWN_CORPUS)).toEqual([]);
  });

  it.skipIf(!hasCorpus)('plays repeats and endings in the same order, by the number of notes', { timeout: 300_000 }, () => {
    const texts = corpusScores().map((slug) => [slug, unwrap(openScoreFile(readCorpusScore(slug))).xml] as const);
    const repeated = texts.filter(([, xml]) => xml.includes('<repeat '));
    expect(repeated.length).toBeGreaterThan(20);
    for (const [slug, xml] of repeated) expect(countPlayed(unwrap(readScoreText(xml))), slug).toBe(witness.countPerformed(xml));
  });
});
