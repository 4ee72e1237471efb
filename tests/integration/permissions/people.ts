import { eq } from 'drizzle-orm';
import { invitations, users } from '@/db/schema';
import { hashPassword } from '@/lib/auth/password';
import { hashToken } from '@/lib/auth/token';
import { type Cases, type Row, may } from './matrix';

/** The owner of this department, on this department's people. */
const OWNER = may('owner');
/** An owner on what is their own department's. */
const ANY_OWNER: Row = { ...OWNER, otherOwner: 'ok' };
/** Anyone who is signed in, on themselves. */
const ONESELF: Row = { ...may('otherStudent', 'classmate', 'student', 'assistant', 'otherInstructor', 'instructor', 'owner'), otherOwner: 'ok' };
/** Those who are not signed in, and those who are. */
const ANYONE: Row = { ...ONESELF, anonymous: 'ok' };
/** The last owner of a department stays. */
const BUT_LAST_OWNERS = { owner: 'in_use', otherOwner: 'in_use' } as const;

export const people: Cases = {
  'sign_in.request_link': { input: () => ({ email: 'nobody@nowhere.example' }), expected: ANYONE },
  'invitations.accept': {
    input: async (world, deps) => {
      await deps.db.update(invitations).set({ tokenHash: hashToken('known') }).where(eq(invitations.id, world.invitationId));
      return { token: 'known', name: 'Someone New', password: 'a long enough one' };
    },
    expected: ANYONE,
  },
  'account.change_name': { input: () => ({ name: 'Another Name' }), expected: ONESELF },
  'account.change_password': {
    input: async (_world, deps) => {
      await deps.db.update(users).set({ passwordHash: await hashPassword('the old password') });
      return { current: 'the old password', password: 'the newer password' };
    },
    expected: ONESELF,
  },
  'account.choose_remark_mail': { input: () => ({ remarkMail: false }), expected: ONESELF },
  'account.choose_department': {
    input: (world, _deps, column) => ({ departmentId: column === 'anonymous' ? world.departmentId : world[column].departmentId }),
    expected: ONESELF,
  },
  'account.choose_department (of others)': {
    input: (world) => ({ departmentId: world.otherOwner.departmentId }),
    expected: may('otherOwner'),
  },
  'account.sign_out_everywhere': { input: () => ({}), expected: ONESELF },
  'account.erase': {
    input: async (_world, deps) => {
      await deps.db.update(users).set({ passwordHash: await hashPassword('the old password') });
      return { current: 'the old password' };
    },
    expected: { ...ONESELF, ...BUT_LAST_OWNERS },
  },
  'account.export': { input: () => ({}), expected: ONESELF },
  'department.change': { input: () => ({ name: 'A New Name', paper: 'Letter' }), expected: ANY_OWNER },
  'department.export': { input: () => ({}), expected: ANY_OWNER },
  'members.invite': { input: () => ({ email: 'x@y.example', role: 'student' }), expected: ANY_OWNER },
  'members.change_role': { input: (world) => ({ userId: world.student.userId, role: 'assistant' }), expected: OWNER },
  'members.remove': { input: (world) => ({ userId: world.student.userId }), expected: OWNER },
  'members.erase': { input: (world) => ({ userId: world.student.userId }), expected: OWNER },
  'members.export': { input: (world) => ({ userId: world.student.userId }), expected: OWNER },
  'invitations.resend': { input: (world) => ({ invitationId: world.invitationId }), expected: OWNER },
  'invitations.revoke': { input: (world) => ({ invitationId: world.invitationId }), expected: OWNER },
};
