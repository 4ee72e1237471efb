import type { Actor } from '@/lib/auth/actor';
import { JOB_HANDLERS } from '@/lib/jobs/handlers';
import { runNextJob } from '@/lib/jobs/run-job';
import { unwrap } from '@/lib/result';
import type { Role } from '@/lib/vocabularies';
import type { Deps } from '@/lib/workflows/deps';
import { uploadScore } from '@/lib/workflows/upload-score';
import { musicXml } from '../../support/small-score';
import { addDepartment, addPerson } from '../../support/world';

export const WORDS = { title: '', composer: '', work: '', source: 'Written by the tests', rights: 'Public domain' };

/** Someone of a department of their own. */
export async function someone(deps: Deps, role: Role): Promise<Actor> {
  return addPerson(deps, await addDepartment(deps, 'A department of the tests'), role, role);
}

export function fileOf(content: string | Uint8Array<ArrayBuffer>, name = 'piece.musicxml'): File {
  return new File([content], name);
}

/** Runs what is queued until nothing is due. */
export async function workOff(deps: Deps): Promise<void> {
  const worker = { id: 'tests', deps, handlers: JOB_HANDLERS, running: new Set<string>() };
  while (await runNextJob(worker));
}

/** A score that was uploaded and read. */
export async function readyScore(deps: Deps, actor: Actor, piece: Parameters<typeof musicXml>[0] = {}): Promise<string> {
  const { scoreId } = unwrap(await uploadScore(deps, actor, { ...WORDS, file: fileOf(musicXml(piece)) }));
  await workOff(deps);
  return scoreId;
}
