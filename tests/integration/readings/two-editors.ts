import type { Actor } from '@/lib/auth/actor';
import { type TestServices, openServices } from '../../support/services';
import { addDepartment, addExcerpt, addPerson, addReading, addScore } from '../../support/world';

/** An instructor and an assistant of one department, and an excerpt for their readings. */
export interface TwoEditors {
  readonly services: TestServices;
  readonly me: Actor;
  readonly colleague: Actor;
  readonly excerptId: string;
}

export async function openTwoEditors(department: string): Promise<TwoEditors> {
  const services = await openServices();
  const departmentId = await addDepartment(services.deps, department);
  const me = await addPerson(services.deps, departmentId, 'instructor', 'me');
  const colleague = await addPerson(services.deps, departmentId, 'assistant', 'colleague');
  const excerptId = await addExcerpt(services.deps, me, await addScore(services.deps, me));
  return { services, me, colleague, excerptId };
}

/** A new reading of the instructor's that both may edit; its id. */
export async function addSharedReading({ services, me, excerptId }: TwoEditors): Promise<string> {
  return addReading(services.deps, me.departmentId, excerptId, { ownerId: me.userId, kind: 'person', shared: 'edit' });
}
