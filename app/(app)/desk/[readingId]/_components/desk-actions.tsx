import { ButtonLink } from '@/components/ui';

interface DeskActionsProps {
  readonly readingId: string;
  readonly excerptId: string;
  readonly staff: boolean;
  readonly editable: boolean;
}

/** Where one goes on from the desk. */
export function DeskActions({ readingId, staff, editable }: DeskActionsProps) {
  if (!staff) return null;
  return <ButtonLink size="small" kind={editable ? 'plain' : 'quiet'} href={`/handouts/${readingId}`}>Handout</ButtonLink>;
}
