/** Verbs of the audit trail as sentences. A verb that is not here is shown as it is: nothing is hidden. */
const VERBS: Readonly<Partial<Record<string, string>>> = {
  'account.change_password': 'changed their password',
  'account.erase': 'deleted their account and data',
  'account.export': 'downloaded their data',
  'account.sign_out_everywhere': 'signed out on every device',
  'department.change': 'changed the department’s settings',
  'department.export': 'downloaded the department’s data',
  'members.change_role': 'changed a role',
  'members.erase': 'deleted a member’s data',
  'members.export': 'downloaded a member’s data',
  'members.invite': 'sent an invitation',
  'members.join': 'joined',
  'members.remove': 'removed a member',
  'members.revoke_invitation': 'took back an invitation',
};

export function formatAuditVerb(verb: string): string {
  return VERBS[verb] ?? verb.replace('.', ': ').replaceAll('_', ' ');
}

/** Short values as `from: student, to: assistant`; ids are left out, the trail shows its subject's. */
export function formatAuditDetails(details: Readonly<Record<string, unknown>>): string {
  return Object.entries(details)
    .filter(([name, value]) => !name.endsWith('Id') && ['string', 'number', 'boolean'].includes(typeof value))
    .map(([name, value]) => `${name}: ${String(value)}`)
    .join(', ');
}
