import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { listRevisions, listRevisionsInput } from '@/lib/workflows/list-revisions';

export const GET = route({ name: 'readings.revisions', can: canBeHere, input: listRevisionsInput }, listRevisions);
