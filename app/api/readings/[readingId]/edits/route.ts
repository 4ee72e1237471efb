import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { editReading, editReadingInput } from '@/lib/workflows/edit-reading';
import { newsInput, readNews } from '@/lib/workflows/read-reading';

export const GET = route({ name: 'readings.news', can: canBeHere, input: newsInput }, readNews);

/** An edit of every label of a long reading, both sides, is the largest. */
export const POST = route({ name: 'readings.edit', can: canBeHere, body: 'json', maxBytes: 4_000_000, input: editReadingInput }, editReading);
