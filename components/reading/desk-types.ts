import type { ReactNode } from 'react';
import type { LabelMark } from '@/components/score/lanes';
import type { Label, Reading } from '@/lib/harmony/reading';
import type { ConventionSheet } from '@/lib/theory/conventions';
import type { BesideReading } from './use-beside';
import type { SaveState } from './use-saving';
import type { Spelling } from './use-spelling';

/**
 * `edit`: one's own reading, or one shared for editing. `read`: someone else's. `answer`: a student's work: no proposals,
 * no why, no other readings. `feedback`: what was handed in, with its marks; nothing can be changed.
 */
export const DESK_MODES = ['edit', 'read', 'answer', 'feedback'] as const;
export type DeskMode = (typeof DESK_MODES)[number];

/** What was said about one label: its mark on the lane, and what the margin tells. */
export interface Feedback extends LabelMark {
  /** The verdict in words: `partly right`. */
  readonly verdict: string;
  /** `1 of 2 points`. */
  readonly points?: string;
  /** Why, and the marker's remark. */
  readonly body?: ReactNode;
}

/** What a student may touch. Without it everything of an `edit` desk may be touched. */
export interface DeskRules {
  /** Spans are given: labels can be written, not split, joined or moved. */
  readonly spansGiven: boolean;
  readonly keysGiven: boolean;
  /** Starts of the spans that are asked; the others are shown grey. Empty: all are asked. */
  readonly askedStarts: readonly number[];
}

export interface DeskProps {
  /** The reading's address, `/api/readings/…`: where it is fetched, edited and remarked on. Null: a desk to try, nothing is kept. */
  readonly base: string | null;
  readonly mode: DeskMode;
  /** Who is at the desk: edits that could not be sent are kept under this id. */
  readonly userId: string;
  /** Where the score's file is fetched (.mxl or MusicXML). */
  readonly scoreUrl: string;
  /** The excerpt: bars as indices into the score's bars, both ends included. */
  readonly firstBar: number;
  readonly lastBar: number;
  readonly reading: Reading;
  readonly version: number;
  /** The sheet that is given: a course's for its key and its students' work. */
  readonly sheet?: ConventionSheet;
  /** Sheets to choose from, the usual one first; none where the given one holds. */
  readonly spellings?: readonly Spelling[];
  /** The course whose key this is: opens under its sheet, one of `spellings`. */
  readonly courseId?: string | null;
  readonly rules?: DeskRules;
  /** By label id; in `feedback` mode. */
  readonly feedback?: Readonly<Record<string, Feedback>>;
  /** Left end of the toolbar: where this is, and how back. */
  readonly heading?: ReactNode;
  /** Right end of the toolbar: hand in, make a handout, … */
  readonly actions?: ReactNode;
  /** Another reading of the excerpt, shown under this one with their differences named. */
  readonly beside?: BesideReading;
  /** A tick to open on; the first label otherwise. */
  readonly openAt?: number;
  /** The bar to open on, by its printed number; goes before `openAt`. */
  readonly openBar?: string;
  /** The page of the margin to open on. */
  readonly openPage?: 'remarks';
  /** Told after every change of the reading: how many labels are settled. */
  onProgress?(settled: number, labels: number): void;
  /** Told how saving stands: whether the server has all that is on the page. */
  onSaving?(state: SaveState): void;
}

export interface Powers {
  readonly write: boolean;
  readonly spans: boolean;
  readonly keys: boolean;
  /** Proposals, why and other readings are shown. */
  readonly proposals: boolean;
  /** Another reading stands beside this one. */
  readonly beside: boolean;
}

export function powersOf(mode: DeskMode, rules: DeskRules | undefined, beside = false): Powers {
  const write = mode === 'edit' || mode === 'answer';
  return {
    write,
    spans: write && !(rules?.spansGiven ?? false),
    keys: write && !(rules?.keysGiven ?? false),
    proposals: mode === 'edit' || mode === 'read',
    beside,
  };
}

/** Labels of the frame: not asked, or on a desk where nothing is asked none. */
export function isGiven(label: Label, rules: DeskRules | undefined): boolean {
  return rules !== undefined && rules.spansGiven && rules.askedStarts.length > 0 && !rules.askedStarts.includes(label.start);
}
