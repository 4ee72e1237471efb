'use client';

import { type ReactNode, useId, useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Button, Select, TextArea } from '@/components/ui';
import { formatPoints } from '@/lib/marking/points';
import { VERDICTS, VERDICT_NAMES, type Verdict } from '@/lib/marking/verdict';
import { override, remark as writeRemark } from '../../../../submissions/actions';
import type { AnswerView } from './marking-views';
import { stepPoints } from './step-points';

interface MarkEditorProps {
  readonly assignmentId: string;
  readonly start: number;
  /** Marked together. */
  readonly answers: readonly AnswerView[];
  readonly pointStep: number;
  readonly remarks: readonly string[];
  /** `all of them`, or a student's name. */
  readonly whose: string;
  /** At the end of the row. */
  readonly children?: ReactNode;
}

/** Points, verdict and remark of some answers to one question. */
export function MarkEditor(props: MarkEditorProps) {
  const { assignmentId, start, answers, pointStep, whose } = props;
  const [busy, act] = useAct();
  const [first] = answers;
  if (!first) return null;
  const at = { assignmentId, startTick: start, submissionIds: answers.map((one) => one.submissionId) };
  const set = (points: number | null, verdict: Verdict | null) => void act(() => override({ ...at, points, verdict }), points === null ? 'As proposed again.' : 'Points changed.');
  const verdict = (next: Verdict) => set(first.points, next);
  return (
    <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-rule pt-2">
      <span className="flex items-center gap-1" role="group" aria-label={`Points for ${whose}`}>
        <Button size="small" aria-label="Fewer points" busy={busy} disabled={first.points <= 0} onClick={() => set(stepPoints(first.points, -1, pointStep, first.maxPoints), overriddenVerdict(first))}>−</Button>
        <span className="tabular min-w-20 text-center">{formatPoints(first.points)} of {formatPoints(first.maxPoints)}</span>
        <Button size="small" aria-label="More points" busy={busy} disabled={first.points >= first.maxPoints} onClick={() => set(stepPoints(first.points, 1, pointStep, first.maxPoints), overriddenVerdict(first))}>+</Button>
      </span>
      <Select aria-label={`Verdict for ${whose}`} className="w-52" value={first.verdict} onChange={(event) => verdict(VERDICTS.find((one) => one === event.target.value) ?? first.verdict)}>
        {VERDICTS.map((one) => <option key={one} value={one}>{VERDICT_NAMES[one]}</option>)}
      </Select>
      {answers.some((one) => one.overridden) ? (
        <Button size="small" kind="quiet" busy={busy} onClick={() => set(null, null)}>
          As proposed ({formatPoints(first.proposed.points)})
        </Button>
      ) : null}
      <RemarkEditor {...props} remark={first.remark ?? ''} onSave={(text) => act(() => writeRemark({ ...at, remark: text }), text === '' ? 'The remark is gone.' : 'The remark is saved.')} />
      {props.children}
    </div>
  );
}

/** The verdict that was set by hand stays when only the points change. */
function overriddenVerdict(answer: AnswerView): Verdict | null {
  return answer.verdict === answer.proposed.verdict ? null : answer.verdict;
}

interface RemarkEditorProps extends MarkEditorProps {
  readonly remark: string;
  onSave(text: string): Promise<boolean>;
}

function RemarkEditor({ remark, remarks, whose, onSave }: RemarkEditorProps) {
  const [open, setOpen] = useState(false);
  const [text, setText] = useState(remark);
  const id = useId();
  if (!open) {
    return (
      <div className={remark ? 'order-last flex w-full flex-wrap items-baseline gap-x-3' : 'contents'}>
        {remark ? <p className="border-l-2 border-ochre pl-2.5 font-book">{remark}</p> : null}
        <button type="button" className="link min-h-6 text-small" onClick={() => { setText(remark); setOpen(true); }}>{remark ? 'Change the remark' : 'Write a remark'}</button>
      </div>
    );
  }
  const save = async (next: string) => {
    if (await onSave(next.trim())) setOpen(false);
  };
  return (
    <form
      className="order-last flex w-full flex-col gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        void save(text);
      }}
    >
      <label htmlFor={id} className="text-small font-medium">Remark to {whose}</label>
      <TextArea id={id} rows={2} value={text} maxLength={2000} autoFocus onChange={(event) => setText(event.target.value)} />
      {remarks.length > 0 ? (
        <Select aria-label="A remark you have used before" value="" onChange={(event) => setText(event.target.value)}>
          <option value="">Use one of your remarks …</option>
          {remarks.map((used) => <option key={used} value={used}>{used.length > 90 ? `${used.slice(0, 90)} …` : used}</option>)}
        </Select>
      ) : null}
      <span className="flex gap-2">
        <Button type="submit" size="small" kind="primary">Save the remark</Button>
        <Button size="small" onClick={() => setOpen(false)}>Leave it</Button>
        {remark ? <Button size="small" kind="quiet" onClick={() => void save('')}>Take it away</Button> : null}
      </span>
    </form>
  );
}
