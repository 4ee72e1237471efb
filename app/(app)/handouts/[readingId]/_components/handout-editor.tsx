'use client';

import { useState } from 'react';
import type { Label } from '@/lib/harmony/reading';
import { askedLabels, type PrintOptions } from '@/lib/handout/print-options';
import type { ConventionSheet } from '@/lib/theory/conventions';
import { AskedChoices } from './asked-choices';
import { HandoutPreview } from './handout-preview';
import { HandoutTextFields } from './handout-text-fields';
import { PaperChoices } from './paper-choices';
import { usePrint } from './use-print';

export interface CourseChoice {
  readonly id: string;
  /** As it is printed: title and term. */
  readonly line: string;
  readonly conventions: ConventionSheet | null;
}

interface HandoutEditorProps {
  readonly readingId: string;
  readonly labels: readonly Label[];
  readonly bars: readonly { readonly number: string; readonly start: number }[];
  readonly courses: readonly CourseChoice[];
  readonly texts: { readonly title: string; readonly byline: string; readonly source: string };
}

export type HandoutForm = PrintOptions & { readonly courseId: string | null };

const INSTRUCTIONS: Readonly<Record<PrintOptions['kind'], string>> = {
  worksheet: 'Write a Roman numeral with its figures on each line. For every leading-tone seventh, say where its leading tone and its seventh go.',
  key: '',
};

/** The form on the left, the sheet as it will be printed on the right. */
export function HandoutEditor({ readingId, labels, bars, courses, texts }: HandoutEditorProps) {
  const [form, setForm] = useState<HandoutForm>(() => startForm(texts, courses[0] ?? null));
  const [attempt, setAttempt] = useState(0);
  const change = (part: Partial<HandoutForm>) => setForm((before) => ({ ...before, ...part }));
  const setKind = (kind: PrintOptions['kind']) => change({ kind, ...(form.instructions === INSTRUCTIONS[form.kind] ? { instructions: INSTRUCTIONS[kind] } : {}) });
  const print = usePrint({ readingId, ...form, chosen: [...form.chosen] }, attempt);
  const asked = askedLabels(labels, form).size;
  return (
    <div className="grid gap-x-10 gap-y-8 lg:grid-cols-[21rem_minmax(0,1fr)]">
      <form className="flex flex-col gap-6" onSubmit={(event) => event.preventDefault()} aria-label="Handout">
        <PaperChoices form={form} onKind={setKind} onChange={change} />
        {form.kind === 'worksheet' ? (
          <AskedChoices form={form} labels={labels} bars={bars} conventions={courses.find(({ id }) => id === form.courseId)?.conventions ?? null} onChange={change} />
        ) : null}
        <HandoutTextFields form={form} courses={courses} onChange={change} />
      </form>
      <HandoutPreview print={print} kind={form.kind} paper={form.paper} asked={asked} onRetry={() => setAttempt((n) => n + 1)} />
    </div>
  );
}

function startForm(texts: HandoutEditorProps['texts'], course: CourseChoice | null): HandoutForm {
  return {
    ...texts,
    courseId: course?.id ?? null,
    course: course?.line ?? '',
    instructions: INSTRUCTIONS.worksheet,
    kind: 'worksheet',
    paper: 'A4',
    staffSize: 'normal',
    keysGiven: true,
    asked: 'all',
    chosen: [],
  };
}
