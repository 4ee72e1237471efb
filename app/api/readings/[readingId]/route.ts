import { canBeHere } from '@/lib/auth/permissions';
import { route } from '@/lib/http/route';
import { readReading, readingInput } from '@/lib/workflows/read-reading';

export const GET = route({ name: 'readings.read', can: canBeHere, input: readingInput }, readReading);
