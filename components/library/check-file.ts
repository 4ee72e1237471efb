import { DEFAULT_LIMITS } from '@/lib/score/limits';

const ENDINGS = /\.(musicxml|xml|mxl)$/i;

/** What is wrong with a file at first sight, in a sentence; null when it is worth a look inside. */
export function checkFile(file: Pick<File, 'name' | 'size'>): string | null {
  if (!ENDINGS.test(file.name)) return 'Not a MusicXML file: the name must end in .musicxml, .xml or .mxl. Export the score as MusicXML from your notation program.';
  if (file.size === 0) return 'The file is empty. Export it again.';
  if (file.size > DEFAULT_LIMITS.fileBytes) return 'Larger than 10 MB. Save it compressed (.mxl), or split the score.';
  return null;
}

/** `312 kB`, `4.2 MB`. */
export function formatBytes(bytes: number): string {
  if (bytes < 1024) return `${bytes} bytes`;
  const kilobytes = bytes / 1024;
  return kilobytes < 1000 ? `${Math.round(kilobytes)} kB` : `${(kilobytes / 1024).toFixed(1)} MB`;
}
