import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { readingInput } from '@/lib/workflows/read-reading';
import { listRemarkPeople } from '@/lib/workflows/remarks';

export const GET = route({ name: 'remarks.people', can: canBeHere, input: readingInput }, listRemarkPeople);
