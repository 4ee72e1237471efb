import { Field, Input } from '@/components/ui';

interface CourseFieldsProps {
  readonly fields: Readonly<Record<string, string>>;
  readonly course?: { readonly title: string; readonly term: string; readonly code: string };
}

export function CourseFields({ fields, course }: CourseFieldsProps) {
  return (
    <>
      <Field label="Title" error={fields['title']} required>
        <Input name="title" defaultValue={course?.title} autoComplete="off" maxLength={300} />
      </Field>
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Term" hint="As people say it: Spring 2027" error={fields['term']}>
          <Input name="term" defaultValue={course?.term} autoComplete="off" maxLength={80} />
        </Field>
        <Field label="Course code" hint="As the catalogue has it" error={fields['code']}>
          <Input name="code" defaultValue={course?.code} autoComplete="off" maxLength={40} />
        </Field>
      </div>
    </>
  );
}
