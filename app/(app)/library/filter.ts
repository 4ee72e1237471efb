import { z } from 'zod';
import { LIBRARY_SORTS, LIBRARY_STATES, type LibraryFilter } from '@/db/queries/library';
import { MODES } from '@/lib/vocabularies';
import { isDescending } from './address';

/** The address of a view of the library. What cannot be read is left out: an old link still shows something. */
const query = z.object({
  q: z.string().trim().max(200).catch(''),
  composer: z.string().max(300).nullable().catch(null),
  key: z
    .string()
    .regex(/^-?\d{1,2}:[a-z]+$/)
    .nullable()
    .catch(null),
  state: z.enum(LIBRARY_STATES).nullable().catch(null),
  by: z.uuid().nullable().catch(null),
  diminished: z.literal('1').nullable().catch(null),
  sort: z.enum(LIBRARY_SORTS).catch('added'),
  order: z.enum(['up', 'down']).nullable().catch(null),
  page: z.coerce.number().int().min(1).max(10_000).catch(1),
});
export type LibraryQuery = z.infer<typeof query>;

export type SearchParams = Readonly<Record<string, string | string[] | undefined>>;

export function parseLibraryQuery(params: SearchParams): LibraryQuery {
  return query.parse(Object.fromEntries(Object.keys(query.shape).map((name) => [name, onlyText(params[name])])));
}

function onlyText(value: string | string[] | undefined): string | null {
  return typeof value === 'string' && value !== '' ? value : null;
}

export function filterOf(view: LibraryQuery): LibraryFilter {
  return {
    words: view.q,
    composer: view.composer,
    key: keyOf(view.key),
    state: view.state,
    uploadedBy: view.by,
    secondaryDiminished: view.diminished !== null,
    sort: view.sort,
    descending: isDescending(view),
    page: view.page,
  };
}

function keyOf(text: string | null): LibraryFilter['key'] {
  const [tonic, name] = text?.split(':') ?? [];
  const mode = MODES.find((each) => each === name);
  return mode ? { tonicFifths: Number(tonic), mode } : null;
}
