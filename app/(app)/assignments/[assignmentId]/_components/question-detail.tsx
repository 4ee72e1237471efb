'use client';

import { useState } from 'react';
import { ChordName } from '@/components/marking/chord-name';
import { placeOf } from '@/components/marking/place-names';
import { Button, Checkbox, Field, Input } from '@/components/ui';
import type { Label } from '@/lib/harmony/reading';
import type { Framed } from '@/lib/marking/key-reading';
import { formatPoints } from '@/lib/marking/points';
import { DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { Alternatives } from './alternatives';
import type { EditedAssignment } from './edited-assignment';

interface QuestionDetailProps {
  readonly assignment: EditedAssignment;
  readonly label: Label;
  readonly alternatives: readonly Framed[];
  readonly points: number | null;
  readonly asked: boolean;
  readonly fixed: boolean;
  readonly mayChange: boolean;
  onToggle(): void;
  onPoints(points: number | null): void;
}

/** One label of the key: asked or not, its worth, and what else is right. */
export function QuestionDetail(props: QuestionDetailProps) {
  const { assignment, label, asked, fixed, mayChange, onToggle } = props;
  const sheet = assignment.conventions ?? DEFAULT_CONVENTIONS;
  return (
    <aside aria-label="The chosen label" className="flex flex-col gap-4 self-start border-t-2 border-ink pt-3">
      <div>
        <p className="caps text-small text-ink-soft">{placeOf(assignment.bars, label.start)}</p>
        {label.numeral ? (
          <p className="text-title"><ChordName chord={{ key: label.key, numeral: label.numeral }} sheet={sheet} keyShown /></p>
        ) : (
          <p className="text-ink-soft">No numeral in the key here: nothing can be asked.</p>
        )}
      </div>
      {label.numeral ? <Checkbox label="Students name this chord" checked={asked} disabled={fixed} onChange={onToggle} /> : null}
      {asked && label.numeral ? (
        <>
          <PointsField {...props} />
          <Alternatives assignment={assignment} label={label} alternatives={props.alternatives} mayChange={mayChange} />
        </>
      ) : null}
    </aside>
  );
}

function PointsField({ assignment, points, mayChange, onPoints }: QuestionDetailProps) {
  const usual = formatPoints(assignment.rubric.pointsPerLabel);
  const [text, setText] = useState(points === null ? '' : formatPoints(points));
  const value = Number(text.replace(',', '.'));
  const isWrong = text.trim() !== '' && !(value > 0 && value <= 100);
  const save = () => {
    const next = text.trim() === '' ? null : value;
    if (!isWrong && next !== points) onPoints(next);
  };
  return (
    <Field label="Points" hint={`Empty: ${usual}, as the rubric says.`} error={isWrong ? 'More than 0, at most 100.' : undefined}>
      <span className="flex gap-2">
        <Input inputMode="decimal" value={text} placeholder={usual} disabled={!mayChange} onChange={(event) => setText(event.target.value)} onBlur={save} className="tabular max-w-24" aria-label="Points" />
        <Button size="small" kind="quiet" disabled={!mayChange || text === ''} onClick={() => { setText(''); onPoints(null); }}>As the rubric</Button>
      </span>
    </Field>
  );
}
