import { DownloadMenu } from '@/components/library/download-menu';
import { Button, ButtonLink, Menu, MenuHeading, MenuLink, MenuRule } from '@/components/ui';

interface DeskActionsProps {
  readonly readingId: string;
  /** Other readings of the excerpt that can be laid beside this one. */
  readonly others: readonly { readonly id: string; readonly title: string; readonly by: string }[];
  readonly besideId: string | null;
  readonly staff: boolean;
  readonly editable: boolean;
}

/** Where one goes on from the desk. */
export function DeskActions({ readingId, others, besideId, staff, editable }: DeskActionsProps) {
  if (!staff) return null;
  return (
    <span className="flex items-center gap-1">
      {others.length > 0 ? (
        <Menu trigger={<Button size="small" className="max-sm:hidden">Side by side</Button>}>
          <MenuHeading>Lay beside this reading</MenuHeading>
          {others.map(({ id, title, by }) => (
            <MenuLink key={id} href={`/desk/${readingId}?beside=${id}`}>
              {title} <span className="text-small text-ink-soft">{by}{id === besideId ? ', now shown' : ''}</span>
            </MenuLink>
          ))}
          {besideId ? (
            <>
              <MenuRule />
              <MenuLink href={`/desk/${readingId}`}>This reading alone</MenuLink>
            </>
          ) : null}
        </Menu>
      ) : null}
      <DownloadMenu readingId={readingId} />
      <ButtonLink size="small" kind={editable ? 'plain' : 'quiet'} href={`/handouts/${readingId}`}>Handout</ButtonLink>
    </span>
  );
}
