import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import type { World } from '../../support/world';
import { type Cases, type Row, may } from './matrix';

/** Who runs the course, and whoever runs the department. */
const RUNNERS = may('instructor', 'owner');
/** Opens a course of their own department. */
const OPENERS: Row = { ...may('otherInstructor', 'instructor', 'owner'), otherOwner: 'ok' };

const theCourse = (world: World) => ({ courseId: world.courseId });

export const courseCases: Cases = {
  'courses.create': { input: () => ({ title: 'New', term: '', code: '' }), expected: OPENERS },
  'courses.join': { input: (world) => ({ code: world.joinCode }), expected: may('otherStudent', 'classmate', 'student') },
  'courses.change': { input: (world) => ({ ...theCourse(world), title: 'New', term: '', code: '' }), expected: RUNNERS },
  'courses.conventions': { input: (world) => ({ ...theCourse(world), conventions: DEFAULT_CONVENTIONS }), expected: RUNNERS },
  'courses.enrolment': { input: (world) => ({ ...theCourse(world), open: false }), expected: RUNNERS },
  'courses.archive': { input: (world) => ({ ...theCourse(world), archived: true }), expected: RUNNERS },
  'courses.add_people': {
    input: (world) => ({ ...theCourse(world), role: 'student', people: [{ name: 'New', email: 'new@pupil.example' }] }),
    expected: RUNNERS,
  },
  'courses.gradebook_csv': { input: theCourse, expected: may('assistant', 'instructor', 'owner') },
  'courses.remove_person': { input: (world) => ({ ...theCourse(world), userId: world.student.userId }), expected: RUNNERS },
};
