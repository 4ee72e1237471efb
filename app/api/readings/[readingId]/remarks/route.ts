import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { readingInput } from '@/lib/workflows/read-reading';
import { addRemark, addRemarkInput, listRemarks } from '@/lib/workflows/remarks';

export const GET = route({ name: 'remarks.list', can: canBeHere, input: readingInput }, listRemarks);
export const POST = route({ name: 'remarks.add', can: canBeHere, body: 'json', input: addRemarkInput }, addRemark);
