import { z } from 'zod';
import type { Change } from '@/lib/harmony/edit';
import { LABEL_STATES, type KeyRegion, type Label, NON_CHORD_KINDS } from '@/lib/harmony/reading';
import { ticks } from '@/lib/score/score';
import { QUALITIES, sizeOf } from '@/lib/theory/chord';
import { MODES, type Step } from '@/lib/theory/key';
import { ADDED_TONES, type Numeral, SPECIALS } from '@/lib/theory/numeral';
import { fifths } from '@/lib/theory/pitch';

/** What a browser may send as an edit of a reading: every number bounded, every list bounded. */

const tick = z.int().min(0).max(50_000_000).transform(ticks);
/** Beyond these no spelling is used: seven sharps on a seventh-sharp key. */
const place = z.int().min(-40).max(40);

const key = z.object({ tonic: place.transform(fifths), mode: z.enum(MODES) });

const degree = z.object({
  step: z.int().min(1).max(7).transform((step) => step as Step),
  alter: z.int().min(-3).max(3),
});

const INVERSIONS = [0, 1, 2, 3, 4] as const;

const numeral: z.ZodType<Numeral> = z
  .object({
    degree,
    quality: z.enum(QUALITIES),
    inversion: z.literal(INVERSIONS),
    applied: z.array(z.object({ degree, mode: z.enum(MODES) })).max(4),
    special: z.enum(SPECIALS).nullable(),
    added: z.array(z.enum(ADDED_TONES)).max(3),
  })
  .refine(({ quality, inversion }) => inversion < sizeOf(quality), 'This chord has no such inversion.');

const certainty = z.number().min(0).max(1);

const label: z.ZodType<Label> = z.object({
  id: z.uuid(),
  start: tick,
  end: tick,
  key,
  numeral: numeral.nullable(),
  state: z.enum(LABEL_STATES),
  certainty: certainty.nullable(),
  others: z.array(z.object({ key, numeral, certainty })).max(12),
  tones: z.array(z.object({ noteId: z.int().min(0).max(1_000_000), kind: z.enum(NON_CHORD_KINDS) })).max(200).optional(),
  pivot: z.boolean().optional(),
});

const region: z.ZodType<KeyRegion> = z.object({ start: tick, end: tick, key });

const MAX_LABELS = 3_000;

const labels = z.array(label).max(MAX_LABELS);
const regions = z.array(region).max(MAX_LABELS);

export const changeInput: z.ZodType<Change> = z.object({
  labels: z.object({ before: labels, after: labels }),
  regions: z.object({ before: regions, after: regions }),
});
