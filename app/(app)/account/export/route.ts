import { z } from 'zod';
import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { exportOwnData } from '@/lib/workflows/export-person';

export const GET = route({ name: 'account.export', can: canBeHere, input: z.object({}) }, exportOwnData);
