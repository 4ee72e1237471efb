import { assignmentCases } from './assignments';
import { courseCases } from './courses';
import { handoutCases } from './handouts';
import { library } from './library';
import type { Cases } from './matrix';
import { people } from './people';
import { readingCases } from './readings';

export const CASES: Cases = { ...people, ...library, ...readingCases, ...handoutCases, ...courseCases, ...assignmentCases };
