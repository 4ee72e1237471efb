import { z } from 'zod';
import { canRunDepartment } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { exportDepartment } from '@/lib/workflows/export-department';

export const GET = route({ name: 'department.export', can: canRunDepartment, input: z.object({}) }, exportDepartment);
