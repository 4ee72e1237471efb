import { z } from 'zod';

/** The words about a score that a person types, with their bounds. The database's columns are the bounds' source. */
const line = z.string().trim().max(300, 'At most 300 characters.');
const paragraph = z.string().trim().max(2_000, 'At most 2,000 characters.');

export const scoreWords = z.object({
  title: line,
  composer: line,
  work: line.default(''),
  source: paragraph.min(1, 'Say where the file comes from, for instance the edition or who encoded it.'),
  rights: paragraph.min(1, 'Say what allows its use, for instance that it is in the public domain.'),
});
export type ScoreWords = z.infer<typeof scoreWords>;

/** Once a score is in the library its title may no longer be empty. */
export const changeScoreInput = scoreWords.extend({
  scoreId: z.uuid(),
  title: line.min(1, 'A score needs a title.'),
});
export type ChangeScoreInput = z.infer<typeof changeScoreInput>;

export const scoreInput = z.object({ scoreId: z.uuid() });
export type ScoreInput = z.infer<typeof scoreInput>;

export const excerptInput = z.object({ excerptId: z.uuid() });
export type ExcerptInput = z.infer<typeof excerptInput>;

export const excerptWords = z.object({
  title: line.min(1, 'An excerpt needs a title.'),
  purpose: paragraph.default(''),
});

/** Bars are 0-based places in the score, both ends included: a printed number need not be unique. */
export const cutExcerptInput = excerptWords.extend({
  scoreId: z.uuid(),
  firstBar: z.int().min(0),
  lastBar: z.int().min(0),
});
export type CutExcerptInput = z.infer<typeof cutExcerptInput>;

export const changeExcerptInput = excerptWords.extend({ excerptId: z.uuid() });
export type ChangeExcerptInput = z.infer<typeof changeExcerptInput>;

/** `a,b,c` of a query: at most a page of the library at a time. */
export const scoreStatesInput = z.object({
  ids: z.string().transform((text) => text.split(',')).pipe(z.array(z.uuid()).max(100)),
});
