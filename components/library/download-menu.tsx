import { Button, Menu, MenuDownload } from '@/components/ui';

interface DownloadMenuProps {
  readonly readingId: string;
  /** Said to who does not see beside what the button stands. */
  readonly title?: string;
  readonly quiet?: boolean;
}

/** A reading as a file, in three forms. */
export function DownloadMenu({ readingId, title, quiet = false }: DownloadMenuProps) {
  const address = `/api/readings/${readingId}/download?form=`;
  return (
    <Menu trigger={<Button size="small" kind={quiet ? 'quiet' : 'plain'} {...(title ? { 'aria-label': `Download: ${title}` } : {})}>Download</Button>}>
      <MenuDownload href={`${address}musicxml`}>The score with the labels in it (MusicXML)</MenuDownload>
      <MenuDownload href={`${address}csv`}>The labels as a table (CSV)</MenuDownload>
      <MenuDownload href={`${address}json`}>The labels for a program (JSON)</MenuDownload>
    </Menu>
  );
}
