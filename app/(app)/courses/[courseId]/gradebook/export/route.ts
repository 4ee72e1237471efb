import { isStaff } from '@/lib/auth/permissions';
import { attachment } from '@/lib/http/attachment';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { courseInput } from '@/lib/workflows/course-input';
import { getGradebook } from '@/lib/workflows/gradebook';
import { formatGradebook } from '@/lib/workflows/gradebook-csv';

export const GET = route({ name: 'courses.gradebook_csv', can: isStaff, input: courseInput }, async (deps, actor, { courseId }) => {
  const gradebook = await getGradebook(deps, actor, courseId);
  if (!gradebook.ok) return gradebook;
  return ok(attachment({ bytes: formatGradebook(gradebook.value), fileName: 'gradebook.csv', mediaType: 'text/csv; charset=utf-8' }));
});
