export { CourseTabs as AssignmentTabs } from '../../../courses/[courseId]/_components/course-tabs';
