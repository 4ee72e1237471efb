'use server';

import { canCreateCourse, canJoinCourse, isStaff } from '@/lib/auth/permissions';
import { action, formAction } from '@/lib/http/action';
import { addPeople } from '@/lib/workflows/add-people';
import { changeCourse, setArchived, setConventions, setEnrolment } from '@/lib/workflows/change-course';
import {
  addPeopleInput,
  changeCourseInput,
  courseWords,
  joinCourseInput,
  removePersonInput,
  setArchivedInput,
  setConventionsInput,
  setEnrolmentInput,
} from '@/lib/workflows/course-input';
import { createCourse } from '@/lib/workflows/create-course';
import { joinCourse } from '@/lib/workflows/join-course';
import { removePerson } from '@/lib/workflows/remove-person';

const inCourse = {
  can: isStaff,
  revalidate: ({ courseId }: { readonly courseId: string }) => ['/courses', `/courses/${courseId}`],
};

export const create = formAction(
  { name: 'courses.create', can: canCreateCourse, input: courseWords, revalidate: () => ['/courses'] },
  createCourse,
);
export const join = formAction({ name: 'courses.join', can: canJoinCourse, input: joinCourseInput, revalidate: () => ['/courses'] }, joinCourse);
export const change = formAction({ name: 'courses.change', input: changeCourseInput, ...inCourse }, changeCourse);
export const chooseConventions = action({ name: 'courses.conventions', input: setConventionsInput, ...inCourse }, setConventions);
export const openEnrolment = action({ name: 'courses.enrolment', input: setEnrolmentInput, ...inCourse }, setEnrolment);
export const archive = action({ name: 'courses.archive', input: setArchivedInput, ...inCourse }, setArchived);
export const addToRoster = action({ name: 'courses.add_people', input: addPeopleInput, ...inCourse }, addPeople);
export const removeFromRoster = action({ name: 'courses.remove_person', input: removePersonInput, ...inCourse }, removePerson);
