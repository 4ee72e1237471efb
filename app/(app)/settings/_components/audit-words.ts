/** Verbs of the audit trail, some with what they were done to, as words. What is not here is shown as it is: nothing is hidden. */
const VERBS: Readonly<Partial<Record<string, string>>> = {
  'account.change_password': 'changed their password',
  'account.erase': 'deleted their account and data',
  'account.export': 'downloaded their data',
  'account.sign_out_everywhere': 'signed out on every device',
  'assignments.change': 'changed an assignment',
  'assignments.closed': 'closed an assignment',
  'assignments.create': 'made an assignment',
  'assignments.delete': 'deleted an assignment',
  'assignments.open': 'opened an assignment',
  'courses.add': 'added someone to a course',
  'courses.archive': 'put a course away',
  'courses.change': 'changed a course',
  'courses.conventions': 'changed a course’s conventions',
  'courses.create': 'opened a course',
  'courses.enrolment': 'changed a course’s enrolment',
  'courses.join': 'joined a course',
  'courses.remove': 'took someone out of a course',
  'cut excerpt': 'cut an excerpt',
  'delete excerpt': 'deleted an excerpt',
  'delete score': 'deleted a score',
  'department.change': 'changed the department’s settings',
  'department.export': 'downloaded the department’s data',
  'marks.again': 'marked again by a changed key',
  'marks.release': 'released marks',
  'members.change_role': 'changed a role',
  'members.erase': 'deleted a member’s data',
  'members.export': 'downloaded a member’s data',
  'members.invite': 'sent an invitation',
  'members.join': 'joined the department',
  'members.remove': 'removed a member',
  'members.revoke_invitation': 'took back an invitation',
  'restore excerpt': 'brought back an excerpt',
  'restore score': 'brought back a score',
  'start key': 'made an answer key',
  'start reading': 'began a reading',
  'submissions.collect': 'collected unfinished work',
  'submissions.hand-in': 'handed in',
  'upload score': 'uploaded a score',
};

export function formatAuditVerb(verb: string, subjectKind: string): string {
  return VERBS[verb] ?? VERBS[`${verb} ${subjectKind}`] ?? `${verb.replace(/[._-]/g, ' ')} (${subjectKind})`;
}

/** Short values as `from: student, to: assistant`; ids are left out, the trail shows its subject's. */
export function formatAuditDetails(details: Readonly<Record<string, unknown>>): string {
  return Object.entries(details)
    .filter(([name, value]) => !name.endsWith('Id') && ['string', 'number', 'boolean'].includes(typeof value))
    .map(([name, value]) => `${name}: ${String(value)}`)
    .join(', ');
}
