'use client';

import { useRouter } from 'next/navigation';
import { type ReactNode, useCallback, useMemo, useState } from 'react';
import { useDropzone } from 'react-dropzone';
import { checkFile } from '@/components/library/check-file';
import { UploadTray } from '@/components/library/upload-tray';
import { usePolling } from '@/components/library/use-polling';
import { type Statements, useUploads } from '@/components/library/use-uploads';
import { Button, PageHeader, useAnnouncer } from '@/components/ui';
import { type ScoreState, fetchScoreStates, isInWork } from './score-states';

interface UploadAreaProps {
  /** What this person wrote last as source and rights. */
  readonly lastStatements: Statements | null;
  /** Scores on the page that are waiting to be read, whoever brought them. */
  readonly inWork: readonly string[];
  readonly children: ReactNode;
}

/** The whole library takes files that are dropped on it. While scores are being read, the page keeps itself up to date. */
export function UploadArea({ lastStatements, inWork, children }: UploadAreaProps) {
  const [statements, setStatements] = useState<Statements>(lastStatements ?? { source: '', rights: '' });
  const { uploads, dispatch, choose } = useUploads('/api/scores', statements);
  const onDrop = useCallback((files: File[]) => choose(files.map((file) => ({ file, problem: checkFile(file) }))), [choose]);
  const { getRootProps, getInputProps, open, isDragActive } = useDropzone({ onDrop, noClick: true, noKeyboard: true });
  const waiting = useMemo(() => uploads.flatMap(({ stage, scoreId }) => (stage === 'waiting' && scoreId ? [scoreId] : [])), [uploads]);
  useScoreWatch([...new Set([...waiting, ...inWork])], (state) => dispatch({ kind: 'read', ...state }));
  return (
    <div {...getRootProps()} className="relative">
      <input {...getInputProps({ 'aria-label': 'MusicXML files', className: 'sr-only', tabIndex: -1 })} />
      {isDragActive ? (
        <p className="plate pointer-events-none fixed inset-4 z-40 flex items-center justify-center bg-sheet/95 font-book text-title">
          Let go to bring these files in
        </p>
      ) : null}
      <PageHeader
        title="Library"
        actions={
          <>
            <p id="drop-hint" className="text-small text-ink-soft sm:text-right">
              Drop MusicXML files anywhere on this page,<br className="hidden sm:block" /> or choose them: .musicxml, .xml, .mxl, up to 10 MB each
            </p>
            <Button kind="primary" onClick={open} aria-describedby="drop-hint">Upload scores</Button>
          </>
        }
      />
      <UploadTray uploads={uploads} dispatch={dispatch} statements={statements} onStatements={setStatements} />
      {children}
    </div>
  );
}

/** Asks about the scores until each is read or refused; tells of each, and has the page drawn anew. */
function useScoreWatch(scoreIds: readonly string[], onRead: (state: ScoreState) => void): void {
  const router = useRouter();
  const { announce, warn } = useAnnouncer();
  const [known, setKnown] = useState<ReadonlyMap<string, string>>(new Map());
  usePolling(scoreIds.length > 0, async () => {
    const states = await fetchScoreStates(scoreIds);
    const changed = states.filter(({ scoreId, state }) => known.get(scoreId) !== state);
    if (changed.length === 0) return false;
    setKnown(new Map([...known, ...changed.map(({ scoreId, state }) => [scoreId, state] as const)]));
    for (const state of changed.filter((each) => !isInWork(each.state))) {
      onRead(state);
      if (state.problem) warn(`“${state.title}” could not be read. Its row says why.`);
      else announce(`“${state.title}” was read and is ready.`);
    }
    router.refresh();
    return true;
  });
}
