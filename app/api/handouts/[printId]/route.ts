import { canUseLibrary } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { printInput, readPrint } from '@/lib/workflows/print-handout';

export const GET = route({ name: 'handouts.progress', can: canUseLibrary, input: printInput }, readPrint);
