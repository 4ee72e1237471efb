'use client';

import { Field, Input, Select, TextArea } from '@/components/ui';
import type { CourseChoice, HandoutForm } from './handout-editor';

interface HandoutTextFieldsProps {
  readonly form: HandoutForm;
  readonly courses: readonly CourseChoice[];
  readonly onChange: (part: Partial<HandoutForm>) => void;
}

/** What is written on the sheet. Choosing a course takes its line and its conventions. */
export function HandoutTextFields({ form, courses, onChange }: HandoutTextFieldsProps) {
  const chooseCourse = (id: string) => {
    const course = courses.find((each) => each.id === id) ?? null;
    onChange({ courseId: course?.id ?? null, course: course?.line ?? '' });
  };
  return (
    <div className="flex flex-col gap-4">
      <Field label="Title" required error={form.title.trim() === '' ? 'A handout needs a title.' : undefined}>
        <Input value={form.title} maxLength={200} onChange={(event) => onChange({ title: event.target.value })} />
      </Field>
      <Field label="Composer and work">
        <Input value={form.byline} maxLength={300} onChange={(event) => onChange({ byline: event.target.value })} />
      </Field>
      <Field label="Course" hint="Its convention sheet decides how the numerals print">
        <Select value={form.courseId ?? ''} onChange={(event) => chooseCourse(event.target.value)}>
          {courses.map(({ id, line }) => <option key={id} value={id}>{line}</option>)}
          <option value="">None: the usual conventions</option>
        </Select>
      </Field>
      <Field label="Course line">
        <Input value={form.course} maxLength={200} onChange={(event) => onChange({ course: event.target.value })} />
      </Field>
      <Field label="Instructions">
        <TextArea rows={5} value={form.instructions} maxLength={3000} onChange={(event) => onChange({ instructions: event.target.value })} />
      </Field>
      <Field label="Source and rights">
        <TextArea rows={3} value={form.source} maxLength={600} onChange={(event) => onChange({ source: event.target.value })} />
      </Field>
    </div>
  );
}
