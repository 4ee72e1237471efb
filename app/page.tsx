import { redirect } from 'next/navigation';
import { isStaff } from '@/lib/auth/permissions';
import { requireActor } from '@/lib/http/visitor';

/** Everyone starts where their work is. */
export default async function StartPage() {
  redirect(isStaff(await requireActor()) ? '/library' : '/courses');
}
