import { courseCases } from './courses';
import { library } from './library';
import type { Cases } from './matrix';
import { people } from './people';
import { readingCases } from './readings';

/** `health.read` asks all parts and tells no one's business; tests/integration/jobs tries it. */
const open: Cases = {};

export const CASES: Cases = { ...people, ...library, ...readingCases, ...courseCases, ...open };
