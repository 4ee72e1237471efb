import { canUseLibrary } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { downloadPrint, printInput } from '@/lib/workflows/print-handout';

export const GET = route({ name: 'handouts.file', can: canUseLibrary, input: printInput }, downloadPrint);
