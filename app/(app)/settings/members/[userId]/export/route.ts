import { canRunDepartment } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { exportMember } from '@/lib/workflows/export-person';
import { memberInput } from '@/lib/workflows/remove-member';

export const GET = route({ name: 'members.export', can: canRunDepartment, input: memberInput }, exportMember);
