import { canUseLibrary } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { printHandout, printHandoutInput } from '@/lib/workflows/print-handout';

export const POST = route({ name: 'handouts.print', can: canUseLibrary, body: 'json', input: printHandoutInput }, printHandout);
