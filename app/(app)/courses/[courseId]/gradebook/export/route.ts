import { isStaff } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { courseInput } from '@/lib/workflows/course-input';
import { getGradebook } from '@/lib/workflows/gradebook';
import { formatGradebook } from '@/lib/workflows/gradebook-csv';

export const GET = route({ name: 'courses.gradebook_csv', can: isStaff, input: courseInput }, async (deps, actor, { courseId }) => {
  const gradebook = await getGradebook(deps, actor, courseId);
  if (!gradebook.ok) return gradebook;
  const headers = { 'content-type': 'text/csv; charset=utf-8', 'content-disposition': 'attachment; filename="gradebook.csv"', 'cache-control': 'private, no-store' };
  return ok(new Response(formatGradebook(gradebook.value), { headers }));
});
