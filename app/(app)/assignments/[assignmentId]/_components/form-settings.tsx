'use client';

import { useState } from 'react';
import { useAnnouncer, Button, Checkbox, Choices, ErrorNote, Field, Input, Radio, TextArea, WarningNote } from '@/components/ui';
import { NumberField } from '@/components/marking/number-field';
import { change } from '../../actions';
import { DateField } from './date-field';
import { type EditedAssignment, changeInputOf } from './edited-assignment';

interface FormSettingsProps {
  readonly assignment: EditedAssignment;
  readonly fixed: boolean;
  readonly mayChange: boolean;
}

type Form = ReturnType<typeof changeInputOf>;

/** Words, form, dates, attempts, and what students see afterwards. */
export function FormSettings({ assignment, fixed, mayChange }: FormSettingsProps) {
  const stored = changeInputOf(assignment);
  const [form, setForm] = useState<Form>(stored);
  const [busy, setBusy] = useState(false);
  const [wrong, setWrong] = useState<{ readonly message: string; readonly fields: Readonly<Record<string, string>> } | null>(null);
  const { announce } = useAnnouncer();
  const set = (part: Partial<Form>) => setForm({ ...form, ...part });
  const isChanged = JSON.stringify(form) !== JSON.stringify(stored);
  const save = async () => {
    setBusy(true);
    const outcome = await change({ ...form, rubric: assignment.rubric }).catch(() => null);
    setBusy(false);
    if (outcome?.ok) announce('Saved.');
    setWrong(outcome?.ok ? null : { message: outcome?.error.message ?? 'The server did not answer. Nothing was lost; try again.', fields: outcome?.error.fields ?? {} });
  };
  return (
    <form
      className="flex max-w-3xl flex-col gap-7"
      onSubmit={(event) => {
        event.preventDefault();
        void save();
      }}
    >
      {wrong ? <ErrorNote>{wrong.message}</ErrorNote> : null}
      <fieldset disabled={!mayChange} className="flex flex-col gap-7">
        <legend className="sr-only">Form and dates</legend>
        <Field label="Title" error={wrong?.fields['title']} required>
          <Input value={form.title} onChange={(event) => set({ title: event.target.value })} maxLength={300} />
        </Field>
        <Field label="Instructions" hint="Students read them before they begin, and at the desk." error={wrong?.fields['instructions']}>
          <TextArea rows={4} value={form.instructions} onChange={(event) => set({ instructions: event.target.value })} maxLength={5000} />
        </Field>
        <Shape form={form} fixed={fixed} set={set} />
        <div className="grid gap-4 sm:grid-cols-3">
          <DateField label="Opens" hint="Empty: as soon as you open it." value={form.opensAt} error={wrong?.fields['opensAt']} onChange={(opensAt) => set({ opensAt })} />
          <DateField label="Due" hint="Later work is marked as late." value={form.dueAt} error={wrong?.fields['dueAt']} onChange={(dueAt) => set({ dueAt })} />
          <DateField label="Closes" hint="From then on nothing is taken." value={form.closesAt} error={wrong?.fields['closesAt']} onChange={(closesAt) => set({ closesAt })} />
        </div>
        <NumberField label="Attempts" hint="The last one that is handed in counts." value={form.attempts} min={1} max={20} error={wrong?.fields['attempts']} onChange={(attempts) => set({ attempts: Math.round(attempts) })} />
        <Checkbox
          label="Students see the key with their feedback"
          hint="Only after their marks are released. Otherwise they see verdicts and reasons that do not give the key away."
          checked={form.showKeyAfterRelease}
          onChange={(event) => set({ showKeyAfterRelease: event.target.checked })}
        />
      </fieldset>
      {mayChange ? <div><Button type="submit" kind="primary" busy={busy} disabled={!isChanged}>Save</Button></div> : null}
    </form>
  );
}

function Shape({ form, fixed, set }: { readonly form: Form; readonly fixed: boolean; readonly set: (part: Partial<Form>) => void }) {
  return (
    <fieldset disabled={fixed} className="flex flex-col gap-5">
      <legend className="sr-only">What students are given</legend>
      {fixed ? <WarningNote>Students have begun: this part is fixed.</WarningNote> : null}
      <Choices legend="Where the chords change">
        <Radio name="segmentation" label="is given" hint="Students name the chord of each span." checked={form.segmentation === 'given'} onChange={() => set({ segmentation: 'given' })} />
        <Radio name="segmentation" label="is asked" hint="Students decide it: they start from one span a bar." checked={form.segmentation === 'open'} onChange={() => set({ segmentation: 'open' })} />
      </Choices>
      <Choices legend="The keys">
        <Radio name="keys" label="are given" checked={form.keysGiven} onChange={() => set({ keysGiven: true })} />
        <Radio name="keys" label="are asked" hint="Students decide where the key goes; tonicised and modulated readings are told apart." checked={!form.keysGiven} onChange={() => set({ keysGiven: false })} />
      </Choices>
      <Checkbox
        label="Labels that are not asked are printed for the student"
        hint="As a start and as context. Only with given spans and given keys."
        checked={form.othersGiven}
        disabled={form.segmentation === 'open' || !form.keysGiven}
        onChange={(event) => set({ othersGiven: event.target.checked })}
      />
    </fieldset>
  );
}
