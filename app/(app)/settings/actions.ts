'use server';

import { canRunDepartment } from '@/lib/auth/permissions';
import { formAction } from '@/lib/http/action';
import { changeDepartment, changeDepartmentInput } from '@/lib/workflows/change-department';

export const saveDepartment = formAction(
  { name: 'department.change', can: canRunDepartment, input: changeDepartmentInput, revalidate: () => ['/settings'] },
  changeDepartment,
);
