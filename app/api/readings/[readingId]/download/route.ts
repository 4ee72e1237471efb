import { canUseLibrary } from '@/lib/auth/permissions';
import { attachment } from '@/lib/http/attachment';
import { route } from '@/lib/http/route';
import { ok } from '@/lib/result';
import { downloadReading, downloadReadingInput } from '@/lib/workflows/download-reading';

/** A reading as annotated MusicXML, as a table or as a report. */
export const GET = route({ name: 'readings.download', can: canUseLibrary, input: downloadReadingInput }, async (deps, actor, input) => {
  const file = await downloadReading(deps, actor, input);
  return file.ok ? ok(attachment(file.value)) : file;
});
