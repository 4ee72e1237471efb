import type { z } from 'zod';
import { noteAudit } from '@/db/queries/audit';
import { findMember } from '@/db/queries/members';
import {
  type PersonScope,
  getPersonAccount,
  listPersonAudit,
  listPersonHandouts,
  listPersonMemberships,
  listPersonReadings,
  listPersonRemarks,
  listPersonScores,
  listPersonSubmissions,
} from '@/db/queries/person-data';
import type { Actor } from '@/lib/auth/actor';
import { canRunDepartment } from '@/lib/auth/permissions';
import { type AppError, appError } from '@/lib/errors';
import { type Result, err, ok } from '@/lib/result';
import type { Deps } from './deps';
import type { memberInput } from './remove-member';

async function personData(deps: Deps, scope: PersonScope) {
  return {
    exportedAt: deps.now(),
    account: await getPersonAccount(deps.db, scope),
    memberships: await listPersonMemberships(deps.db, scope),
    scores: await listPersonScores(deps.db, scope),
    readings: await listPersonReadings(deps.db, scope),
    handouts: await listPersonHandouts(deps.db, scope),
    remarks: await listPersonRemarks(deps.db, scope),
    submissions: await listPersonSubmissions(deps.db, scope),
    trail: await listPersonAudit(deps.db, scope),
  };
}

function download(content: object, fileName: string): Response {
  return new Response(JSON.stringify(content, null, 2), {
    headers: {
      'content-type': 'application/json; charset=utf-8',
      'content-disposition': `attachment; filename="${fileName}"`,
      'cache-control': 'private, no-store',
    },
  });
}

/** Everything that is kept about the actor, in every department, as a file. */
export async function exportOwnData(deps: Deps, actor: Actor): Promise<Result<Response, AppError>> {
  const content = await personData(deps, { userId: actor.userId, departmentId: null });
  await noteAudit(deps, actor, { verb: 'account.export', subjectKind: 'user', subjectId: actor.userId });
  return ok(download(content, 'understave-my-data.json'));
}

/** The owner hands a member what the department keeps about them. */
export async function exportMember(deps: Deps, actor: Actor, input: z.output<typeof memberInput>): Promise<Result<Response, AppError>> {
  if (!canRunDepartment(actor)) return err(appError('not_found'));
  const member = await findMember(deps.db, actor, input.userId);
  if (!member) return err(appError('not_found'));
  const content = await personData(deps, { userId: member.userId, departmentId: actor.departmentId });
  await noteAudit(deps, actor, { verb: 'members.export', subjectKind: 'user', subjectId: member.userId });
  return ok(download(content, `understave-${member.userId}.json`));
}
