import type { Actor } from '@/lib/auth/actor';
import { type AppError, messageOf } from '@/lib/errors';
import type { Result } from '@/lib/result';
import type { Deps } from '@/lib/workflows/deps';
import { DEPARTMENT, personOf } from './people';

/** The demo is made by its own people, through the same workflows as in the browser. */
export function actorOf(mailbox: string): Actor {
  const { id, role, name, email } = personOf(mailbox);
  return { userId: id, departmentId: DEPARTMENT.id, role, name, email };
}

/** The demo's steps cannot fail for a reason that a person could mend: a refusal is a bug. */
export function must<T>(result: Result<T, AppError>): T {
  if (result.ok) return result.value;
  throw new Error(`${result.error.code}: ${messageOf(result.error)} ${JSON.stringify(result.error.fields ?? {})}`);
}

/** The same deps some days ago, so that the demo has a past. */
export function daysAgo(deps: Deps, days: number, minutes = 0): Deps {
  const moment = new Date(deps.now().getTime() - days * 86_400_000 + minutes * 60_000);
  return { ...deps, now: () => moment };
}
