// Source: the numerals of the analyses in ../shared/corpus (a published open dataset, read where it lies, never
// committed), understood by the independent reader of ../shared/tools/score_analysis.py.
import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';

import { beforeAll, describe, expect, it } from 'vitest';

import { reduceApplied } from '@/lib/theory/applied';
import { qualityInReport } from '@/lib/theory/chord';
import type { Mode } from '@/lib/theory/key';
import { parseNumeral } from '@/lib/theory/numeral-parse';
import { fifths, formatPitchClass } from '@/lib/theory/pitch';
import { spellNumeral } from '@/lib/theory/spell';

const SHARED = path.resolve(import.meta.dirname, '../../../shared');
const CORPUS = path.join(SHARED, 'corpus/dev');
const TOOLS = path.join(SHARED, 'tools');
const missing = [CORPUS, path.join(TOOLS, 'score_analysis.py')].filter((place) => !existsSync(place));
if (missing.length > 0) console.warn('Corpus numerals are not checked: ../shared/corpus or ../shared/tools is absent.');

/** Forms of the corpus's own text format that are no printed notation: ours refuses them and says where. */
const NOT_READ: readonly RegExp[] = [
  /\[(?!add[469]\])/, // [no5], [b7], [add#6]
  /\/o/, // /o for ø
  /[#b](?![79]$)\d/, // altered figures inside: 6b5, 4#3
  /ø(?![7642/])|ø64/, // ø without the figures of a seventh
  /^[ivIV]+[34]$/, // a lone 3 or 4
  /^It.*\[add/, // an augmented sixth with an added tone
];

/** Read by both, differently, each time by a stated rule. */
const READ_OTHERWISE: readonly RegExp[] = [
  /^iio(?:7|65|43|42)$/, // the reader takes ii°7 for a half-diminished slip; what is typed is fully diminished
  /^(?:V7642|I?V765)$/, // ninth chords in inversion; the reader knows ninths in root position only
  /^bII(?:7|65|43|42)$/, // N7 is Neapolitan here; there only the triad is
  /^bIII/, // in minor a single flat before III only reminds, as before VI and VII
  /^bVII(?:7|65|43|42)$/, // the seventh of a borrowed chord comes from the parallel minor
];

function numeralsOfCorpus(): string[] {
  const files = readdirSync(CORPUS).map((slug) => path.join(CORPUS, slug, 'analysis.txt')).filter((file) => existsSync(file));
  const lines = files.flatMap((file) => readFileSync(file, 'utf8').split('\n'));
  const words = lines.filter((line) => /^m\d/.test(line) && !line.includes('=')).flatMap((line) => line.trim().split(/\s+/).slice(1));
  const isPlace = /^(?:b[\d.]+|[A-Ga-g][#b-]*:|\|\|?|:\|\||\|\|:|var\d)$/;
  return [...new Set(words.filter((word) => !isPlace.test(word)))].toSorted();
}

type Understood = readonly [string, string, number, number, number, readonly [number, number, Mode] | null, string | null];

/** What the independent reader understands in C major and in C minor. */
function readIndependently(numerals: readonly string[]): Map<string, Understood> {
  const script = `
import json, sys
sys.path.insert(0, sys.argv[1])
import score_analysis as sa
out = []
for text in json.load(sys.stdin):
    for mode in ("major", "minor"):
        lab = sa.parse_numeral(text, ((0, 0), mode))
        out.append([mode + " " + text, [sa.pitch_name(lab.root), lab.quality, lab.inversion, lab.step, lab.alter, lab.applied, lab.special]])
print(json.dumps(out))`;
  return new Map(JSON.parse(execFileSync('python3', ['-c', script, TOOLS], { input: JSON.stringify(numerals), encoding: 'utf8' })) as [string, Understood][]);
}

function understand(mode: Mode, text: string): Understood | null {
  const read = parseNumeral(text, mode);
  if (!read.ok) return null;
  const { degree, quality, inversion, special } = read.value;
  const { applied } = reduceApplied(read.value, mode);
  const root = formatPitchClass(spellNumeral({ tonic: fifths(0), mode }, read.value).root);
  return [root, qualityInReport(quality), inversion, degree.step, degree.alter, applied && [applied.degree.step, applied.degree.alter, applied.mode], special];
}

describe.skipIf(missing.length > 0)('numerals of the corpus', () => {
  let numerals: string[] = [];
  let independent = new Map<string, Understood>();
  beforeAll(() => {
    numerals = numeralsOfCorpus();
    independent = readIndependently(numerals);
  }, 60_000);

  it('are read as the independent reader reads them, in major and in minor', () => {
    const plain = numerals.filter((text) => ![...NOT_READ, ...READ_OTHERWISE].some((form) => form.test(text)));
    expect(plain.length).toBeGreaterThan(300);
    const both = plain.flatMap((text) => (['major', 'minor'] as const).map((mode) => ({ mode, text })));
    const ours = both.map(({ mode, text }) => [`${mode} ${text}`, understand(mode, text)]);
    expect(ours).toEqual(both.map(({ mode, text }) => [`${mode} ${text}`, independent.get(`${mode} ${text}`)]));
  });

  it('that are no printed notation are refused', () => {
    const refused = numerals.filter((text) => NOT_READ.some((form) => form.test(text)));
    expect(refused.filter((text) => parseNumeral(text, 'major').ok)).toEqual([]);
  });
});
