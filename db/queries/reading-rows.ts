import { asc, eq, inArray } from 'drizzle-orm';
import type { Db } from '@/db/client';
import { keyRegions, labelAlternatives, labels, readings } from '@/db/schema';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { formatNumeral } from '@/lib/theory/numeral-format';
import type { MarkedTone } from '@/lib/harmony/reading';
import type { Key } from '@/lib/theory/key';
import type { Numeral } from '@/lib/theory/numeral';
import { fifths } from '@/lib/theory/pitch';
import type { LabelState, Mode, ReadingKind, ReadingState } from '@/lib/vocabularies';

/**
 * A reading's content as it lies in rows: what lib/harmony's Reading is, with plain numbers for ticks. A Reading can be
 * given where a StoredReading is asked for; lib/workflows/stored-reading.ts turns one back.
 */
export interface StoredReading {
  readonly start: number;
  readonly end: number;
  readonly regions: readonly StoredRegion[];
  readonly labels: readonly StoredLabel[];
}

export interface StoredRegion {
  readonly start: number;
  readonly end: number;
  readonly key: Key;
}

export interface StoredLabel {
  readonly id: string;
  readonly start: number;
  readonly end: number;
  readonly key: Key;
  readonly numeral: Numeral | null;
  readonly state: LabelState;
  readonly certainty: number | null;
  readonly others: readonly StoredAlternative[];
  readonly tones?: readonly MarkedTone[] | undefined;
  readonly pivot?: boolean | undefined;
}

export interface StoredAlternative {
  readonly key: Key;
  readonly numeral: Numeral;
  readonly certainty: number;
}

/** Rows sent in one statement; well under max_allowed_packet. */
const CHUNK = 400;

/** A label as its row. The columns repeat what passage search asks of the numeral. */
export function labelRow(readingId: string, label: StoredLabel, position: number): typeof labels.$inferInsert {
  return {
    id: label.id,
    readingId,
    position,
    startTick: label.start,
    endTick: label.end,
    keyTonicFifths: label.key.tonic,
    keyMode: label.key.mode,
    state: label.state,
    certainty: label.certainty,
    tones: label.tones ?? null,
    pivot: label.pivot ?? false,
    ...numeralColumns(label.numeral, label.key.mode),
  };
}

/** The columns of a numeral in a key of `mode`; all null for a blank. */
export function numeralColumns(numeral: Numeral | null, mode: Mode) {
  const target = numeral?.applied[0];
  return {
    numeral,
    numeralText: numeral ? formatNumeral(numeral, mode, DEFAULT_CONVENTIONS) : null,
    degreeStep: numeral?.degree.step ?? null,
    degreeAlter: numeral?.degree.alter ?? null,
    quality: numeral?.quality ?? null,
    inversion: numeral?.inversion ?? null,
    appliedStep: target?.degree.step ?? null,
    appliedAlter: target?.degree.alter ?? null,
    appliedMode: target?.mode ?? null,
    special: numeral?.special ?? null,
  };
}

export function alternativeRow(labelId: string, other: StoredAlternative, rank: number): typeof labelAlternatives.$inferInsert {
  return {
    labelId,
    rank,
    keyTonicFifths: other.key.tonic,
    keyMode: other.key.mode,
    numeralText: formatNumeral(other.numeral, other.key.mode, DEFAULT_CONVENTIONS),
    numeral: other.numeral,
    certainty: other.certainty,
  };
}

function chunksOf<T>(rows: readonly T[]): T[][] {
  const chunks: T[][] = [];
  for (let at = 0; at < rows.length; at += CHUNK) chunks.push(rows.slice(at, at + CHUNK));
  return chunks;
}

/** Writes the content of a reading that has none yet. Label ids must be new UUIDs. */
export async function insertReadingContent(db: Db, readingId: string, reading: StoredReading): Promise<void> {
  const regionRows = reading.regions.map((region) => ({
    readingId,
    startTick: region.start,
    endTick: region.end,
    tonicFifths: region.key.tonic,
    mode: region.key.mode,
  }));
  const labelRows = reading.labels.map((label, position) => labelRow(readingId, label, position));
  const alternativeRows = reading.labels.flatMap((label) => label.others.map((other, rank) => alternativeRow(label.id, other, rank)));
  for (const chunk of chunksOf(regionRows)) await db.insert(keyRegions).values(chunk);
  for (const chunk of chunksOf(labelRows)) await db.insert(labels).values(chunk);
  for (const chunk of chunksOf(alternativeRows)) await db.insert(labelAlternatives).values(chunk);
}

/** Takes the content away and leaves the reading's own row. Remarks keep their place and lose their label. */
export async function deleteReadingContent(db: Db, readingId: string): Promise<void> {
  await db.delete(keyRegions).where(eq(keyRegions.readingId, readingId));
  await db.delete(labels).where(eq(labels.readingId, readingId));
}

type AlternativeRow = typeof labelAlternatives.$inferSelect;

async function loadAlternatives(db: Db, labelIds: readonly string[]): Promise<ReadonlyMap<string, readonly AlternativeRow[]>> {
  const byLabel = new Map<string, AlternativeRow[]>();
  for (const chunk of chunksOf(labelIds)) {
    const rows = await db.select().from(labelAlternatives).where(inArray(labelAlternatives.labelId, chunk)).orderBy(asc(labelAlternatives.rank));
    for (const row of rows) byLabel.set(row.labelId, [...(byLabel.get(row.labelId) ?? []), row]);
  }
  return byLabel;
}

function keyOf(tonic: number, mode: Mode): Key {
  return { tonic: fifths(tonic), mode };
}

function storedLabel(row: typeof labels.$inferSelect, others: readonly AlternativeRow[]): StoredLabel {
  return {
    id: row.id,
    start: row.startTick,
    end: row.endTick,
    key: keyOf(row.keyTonicFifths, row.keyMode),
    numeral: row.numeral,
    state: row.state,
    certainty: row.certainty,
    ...(row.tones ? { tones: row.tones } : {}),
    ...(row.pivot ? { pivot: true } : {}),
    others: others.map((other) => ({
      key: keyOf(other.keyTonicFifths, other.keyMode),
      numeral: other.numeral,
      certainty: other.certainty ?? 0,
    })),
  };
}

type ReadingRow = Pick<typeof readings.$inferSelect, 'id' | 'startTick' | 'endTick'>;

/** Reads the content back; whoever calls it has checked who may see the reading. Alternatives of a key are among `others`. */
export async function unsafeLoadReadingContent(db: Db, reading: ReadingRow, content: { readonly alternatives: boolean } = { alternatives: true }): Promise<StoredReading> {
  const regionRows = await db.select().from(keyRegions).where(eq(keyRegions.readingId, reading.id)).orderBy(asc(keyRegions.startTick));
  const labelRows = await db.select().from(labels).where(eq(labels.readingId, reading.id)).orderBy(asc(labels.position));
  const alternatives = await loadAlternatives(db, content.alternatives ? labelRows.map((row) => row.id) : []);
  return {
    start: reading.startTick,
    end: reading.endTick,
    regions: regionRows.map((row) => ({ start: row.startTick, end: row.endTick, key: keyOf(row.tonicFifths, row.mode) })),
    labels: labelRows.map((row) => storedLabel(row, alternatives.get(row.id) ?? [])),
  };
}

export interface NewReading {
  readonly id: string;
  readonly excerptId: string;
  readonly departmentId: string;
  /** Null for the engine's own. */
  readonly ownerId: string | null;
  readonly kind: ReadingKind;
  readonly title: string;
  readonly state: ReadingState;
  readonly startTick: number;
  readonly endTick: number;
  readonly basedOn?: string | null;
}

export async function insertReading(db: Db, reading: NewReading): Promise<void> {
  await db.insert(readings).values(reading);
}
