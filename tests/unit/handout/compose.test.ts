import { beforeAll, describe, expect, it } from 'vitest';
import { DEMO_PIECES, engravePiece } from '@/db/seed/music';
import { DEMO_READINGS } from '@/db/seed/music/readings';
import { parseReadingText } from '@/db/seed/reading-text';
import { type HandoutDocument, composeHandout } from '@/lib/handout/compose';
import type { HandoutOrder } from '@/lib/handout/order';
import { writePdf } from '@/lib/handout/pdf';
import type { Label, Reading } from '@/lib/harmony/reading';
import { unwrap } from '@/lib/result';
import { readScoreText } from '@/lib/score/read-score';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';

const XML = engravePiece(DEMO_PIECES.eveningHymn);
const SCORE = unwrap(readScoreText(XML));
let count = 0;
const READING = parseReadingText(DEMO_READINGS.eveningHymn, {
  ticksPerQuarter: SCORE.ticksPerQuarter,
  newId: () => `label-${(count += 1)}`,
  state: 'accepted',
}) as Reading;

function order(part: Partial<HandoutOrder> = {}): HandoutOrder {
  return {
    kind: 'key',
    paper: 'A4',
    staffSize: 'normal',
    keysGiven: true,
    conventions: DEFAULT_CONVENTIONS,
    title: 'Evening Hymn',
    byline: 'A composer',
    course: 'Harmony II',
    instructions: '',
    source: 'A source',
    xml: XML,
    score: SCORE,
    firstBar: 0,
    lastBar: SCORE.bars.length - 1,
    reading: READING,
    asked: new Set<string>(),
    ...part,
  };
}

/** Letters of the numerals as they stand on the pages, in reading order. */
function lettersOf(document: HandoutDocument): string[] {
  return [...document.pages.join('').matchAll(/font-family="numeral"[^>]*>([^<]+)</g)].map((match) => match[1] as string);
}

function blanksOf(document: HandoutDocument): number[] {
  return [...document.pages.join('').matchAll(/font-family="sans" font-size="230">(\d+)</g)].map((match) => Number(match[1]));
}

const isApplied = (label: Label) => (label.numeral?.applied.length ?? 0) > 0;

describe('composeHandout', () => {
  let key: HandoutDocument;
  beforeAll(async () => void (key = await composeHandout(order())));

  it('prints every label of a key, and the name of each key where its region starts', () => {
    // The letters of the first two bars as the reading's text has them: I V6 I vi | ii6 viiø7/V V.
    expect(lettersOf(key).slice(0, 11)).toEqual(['I', 'V', 'I', 'vi', 'ii', 'vii', 'ø', '/', 'V', 'V', 'V']);
    expect(blanksOf(key)).toEqual([]);
    const page = key.pages.join('');
    expect(page).toContain('>G major<');
    expect(page).toContain('>e minor<');
  });

  it('puts a numbered blank under each asked span of a worksheet, and prints the others', async () => {
    const asked = new Set(READING.labels.filter(isApplied).map(({ id }) => id));
    const sheet = await composeHandout(order({ kind: 'worksheet', asked }));
    expect(blanksOf(sheet)).toEqual(Array.from({ length: asked.size }, (_, i) => i + 1));
    expect(lettersOf(sheet)).not.toContain('/');
    expect(sheet.pages.join('')).toContain('>Name<');
  });

  it('asks for the key at the start when keys are not given', async () => {
    const all = new Set(READING.labels.map(({ id }) => id));
    const page = (await composeHandout(order({ kind: 'worksheet', asked: all, keysGiven: false }))).pages.join('');
    expect(page.match(/>Key</g)).toHaveLength(1);
    expect(page).not.toContain('G major');
  });

  it('cuts to the bars asked for', async () => {
    const bar = SCORE.bars[4];
    const [start, end] = [bar?.start ?? 0, (bar?.start ?? 0) + 2 * (bar?.length ?? 0)];
    const labels = READING.labels.filter((label) => label.start >= start && label.start < end);
    const cut = await composeHandout(order({ firstBar: 4, lastBar: 5, reading: { ...READING, labels } }));
    expect(cut.pages).toHaveLength(1);
    // Bars 5 and 6: I vii°7/ii ii viiø65/V | V6 vii°7/vi vi.
    expect(lettersOf(cut)).toEqual(['I', 'vii', '°', '/', 'ii', 'ii', 'vii', 'ø', '/', 'V', 'V', 'vii', '°', '/', 'vi', 'vi']);
  });

  it('escapes what people wrote, and sets other scripts from fonts that have them', async () => {
    const page = (await composeHandout(order({ title: '<script>alert(1)</script> & Ω', byline: 'Antonín Dvořák' }))).pages.join('');
    expect(page).not.toContain('<script>');
    expect(page).toContain('&lt;script&gt;alert(1)&lt;/script&gt; &amp;');
    expect(page).toContain('font-family="book.greek"');
    expect(page).toContain('font-family="book-italic.latin-ext"');
  });

  it('makes the same drawing of the same order', async () => {
    expect((await composeHandout(order())).pages).toEqual(key.pages);
  });
});

describe('writePdf', () => {
  // Source: ISO 216 (A4 is 210 × 297 mm) and ANSI/ASME Y14.1 (Letter is 8.5 × 11 in), in points of 1/72 in.
  it.each([
    ['A4', 595.28, 841.89],
    ['Letter', 612, 792],
  ] as const)('writes %s pages with vector music and embedded fonts', async (paper, width, height) => {
    const document = await composeHandout(order({ paper }));
    const pdf = Buffer.from(await writePdf(document, { createdAt: new Date(0), author: '' })).toString('latin1');
    const box = /\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/.exec(pdf);
    expect(Number(box?.[1])).toBeCloseTo(width, 1);
    expect(Number(box?.[2])).toBeCloseTo(height, 1);
    expect(pdf).toMatch(/\/FontName \/[A-Z]+\+Alegreya-Medium/);
    expect(pdf).not.toContain('/Subtype /Image');
    const declared = pdf.match(/\/Type \/FontDescriptor/g)?.length ?? 0;
    expect(pdf.match(/\/FontFile[23] /g)).toHaveLength(declared);
  });

  it('writes the same bytes for the same document and date', async () => {
    const document = await composeHandout(order({ firstBar: 0, lastBar: 1, reading: { ...READING, labels: READING.labels.slice(0, 7) } }));
    const facts = { createdAt: new Date(0), author: '' };
    expect(Buffer.from(await writePdf(document, facts)).equals(Buffer.from(await writePdf(document, facts)))).toBe(true);
  });
});
