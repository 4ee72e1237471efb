/** Bounds on what is read, so that no file takes the program down. Bytes count what is really there, not what a header says. */
export interface ScoreLimits {
  /** Of the file as uploaded. */
  readonly fileBytes: number;
  /** Of all entries of a compressed file together, unpacked; also of the text of a plain one. */
  readonly unpackedBytes: number;
  readonly entries: number;
  readonly notes: number;
  /** Of elements inside one another; a real score needs about a dozen. */
  readonly depth: number;
  /** Elements within one bar of one part: what is held in memory at a time. */
  readonly barElements: number;
}

const MEGABYTE = 1024 * 1024;

export const DEFAULT_LIMITS: ScoreLimits = {
  fileBytes: 10 * MEGABYTE,
  unpackedBytes: 100 * MEGABYTE,
  entries: 64,
  notes: 200_000,
  depth: 200,
  barElements: 100_000,
};
