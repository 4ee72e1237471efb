import { PRESET_NAMES } from '@/app/(app)/courses/[courseId]/_components/convention-choices';
import type { Spelling } from '@/components/reading/use-spelling';
import type { Course } from '@/db/queries/courses';
import { CONVENTION_PRESETS, type ConventionPreset, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';

/** The sheets a desk can print under: the usual one, those of one's courses, and the ready-made ones named by what they print. */
export function listSpellings(courses: readonly Pick<Course, 'id' | 'title' | 'conventions' | 'archivedAt'>[]): Spelling[] {
  const own = courses.filter(({ archivedAt }) => archivedAt === null);
  const presets = Object.entries(PRESET_NAMES) as [ConventionPreset, string][];
  return [
    { id: 'usual', name: `as usual: ${PRESET_NAMES['cad64-slash-N6']}`, sheet: DEFAULT_CONVENTIONS },
    ...own.map(({ id, title, conventions }) => ({ id, name: `as in ${title}`, sheet: conventions ?? DEFAULT_CONVENTIONS })),
    ...presets.filter(([id]) => CONVENTION_PRESETS[id] !== DEFAULT_CONVENTIONS).map(([id, name]) => ({ id, name, sheet: CONVENTION_PRESETS[id] })),
  ];
}
