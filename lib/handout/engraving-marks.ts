/** A place under the score that wants room for a label: the engraver spaces the notes so that `roomFor` fits. */
export interface EngravingMark {
  readonly id: string;
  /** 0-based index of the bar in the file. */
  readonly bar: number;
  /** Quarters from the start of the bar, as a fraction. */
  readonly onset: { readonly numerator: number; readonly denominator: number };
  /** Denominator of the bar's time signature: the engraver counts beats of this value. */
  readonly beatType: number;
  /** A text about as wide as what will be set there. */
  readonly roomFor: string;
}

/**
 * Puts the marks into the engraver's own document (MEI, the Music Encoding Initiative's format) as harmony texts below
 * the lowest staff, placed by beat: the engraver then spaces notes and systems for them and tells where they stand.
 */
export function insertMarks(mei: string, marks: readonly EngravingMark[]): string {
  const staff = lowestStaff(mei);
  const byBar = new Map<number, string>();
  for (const mark of marks) byBar.set(mark.bar, (byBar.get(mark.bar) ?? '') + markElement(mark, staff));
  let bar = -1;
  return mei.replace(/<\/measure>/g, (end) => {
    bar += 1;
    return (byBar.get(bar) ?? '') + end;
  });
}

function lowestStaff(mei: string): number {
  const numbers = [...mei.matchAll(/<staffDef[^>]*\sn="(\d+)"/g)].map((match) => Number(match[1]));
  return Math.max(1, ...numbers);
}

function markElement(mark: EngravingMark, staff: number): string {
  const quarters = mark.onset.numerator / mark.onset.denominator;
  const beat = 1 + (quarters * mark.beatType) / 4;
  const text = mark.roomFor.replace(/[<&>]/g, '-');
  return `<harm xml:id="${mark.id}" place="below" staff="${staff}" tstamp="${Number(beat.toFixed(6))}">${text}</harm>`;
}
