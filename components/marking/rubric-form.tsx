'use client';

import { Checkbox, Choices, Field, Radio, Select } from '@/components/ui';
import { RUBRIC_PRESETS, type Rubric } from '@/lib/marking/rubric';
import { PARTS, type Part } from '@/lib/marking/verdict';
import { NumberField } from './number-field';

interface RubricFormProps {
  readonly rubric: Rubric;
  readonly open: boolean;
  readonly keysGiven: boolean;
  readonly disabled: boolean;
  onChange(rubric: Rubric): void;
}

/** Everything a rubric says, in words a teacher would use. */
export function RubricForm({ rubric, open, keysGiven, disabled, onChange }: RubricFormProps) {
  const set = (change: Partial<Rubric>) => onChange({ ...rubric, ...change });
  return (
    <fieldset disabled={disabled} className="flex flex-col gap-6">
      <legend className="sr-only">Rubric</legend>
      <PresetChoice rubric={rubric} onChange={onChange} />
      <div className="flex flex-wrap gap-4">
        <NumberField label="Points per label" value={rubric.pointsPerLabel} min={0.25} max={100} onChange={(pointsPerLabel) => set({ pointsPerLabel })} />
        <NumberField label="In steps of" hint="0.5: half points" value={rubric.pointStep} min={0.05} max={10} onChange={(pointStep) => set({ pointStep })} />
      </div>
      <Shares rubric={rubric} open={open} keysGiven={keysGiven} set={set} />
      <Strictness rubric={rubric} set={set} />
      <SixFours rubric={rubric} set={set} />
      <Credits rubric={rubric} open={open} keysGiven={keysGiven} set={set} />
    </fieldset>
  );
}

function PresetChoice({ rubric, onChange }: Pick<RubricFormProps, 'rubric' | 'onChange'>) {
  const same = (a: Rubric) => PARTS.every((part) => a.shares[part] === rubric.shares[part]) && stripped(a) === stripped(rubric);
  const chosen = Object.entries(RUBRIC_PRESETS).find(([, preset]) => same(preset.rubric));
  return (
    <Field label="Start from" hint={chosen?.[1].description ?? 'Your own rubric.'}>
      <Select
        value={chosen?.[0] ?? ''}
        onChange={(event) => {
          const preset = Object.entries(RUBRIC_PRESETS).find(([name]) => name === event.target.value);
          if (preset) onChange(preset[1].rubric);
        }}
      >
        <option value="">own rubric</option>
        {Object.entries(RUBRIC_PRESETS).map(([name, preset]) => <option key={name} value={name}>{preset.name}</option>)}
      </Select>
    </Field>
  );
}

function stripped({ shares: _shares, ...rest }: Rubric): string {
  return JSON.stringify(Object.entries(rest).sort(([a], [b]) => a.localeCompare(b)));
}

type Set = (change: Partial<Rubric>) => void;

const SHARE_NAMES: Readonly<Record<Part, string>> = {
  root: 'Root',
  quality: 'Quality',
  inversion: 'Inversion',
  applied: 'Target of an applied chord',
  function: 'Kind of six-four',
  key: 'Key',
  boundary: 'Place of the change',
};

function Shares({ rubric, open, keysGiven, set }: { rubric: Rubric; open: boolean; keysGiven: boolean; set: Set }) {
  const parts = PARTS.filter((part) => (part !== 'boundary' || open) && (part !== 'key' || !keysGiven));
  return (
    <fieldset>
      <legend className="mb-1 text-small font-medium">Shares of the points</legend>
      <p className="mb-2 text-micro text-ink-soft">Only what applies to a label counts: a plain triad has no target.</p>
      <div className="grid grid-cols-2 gap-x-4 gap-y-3 sm:grid-cols-3">
        {parts.map((part) => (
          <NumberField key={part} label={SHARE_NAMES[part]} value={rubric.shares[part]} min={0} max={100} onChange={(share) => set({ shares: { ...rubric.shares, [part]: share } })} />
        ))}
      </div>
    </fieldset>
  );
}

function Strictness({ rubric, set }: { rubric: Rubric; set: Set }) {
  return (
    <Choices legend="How strictly">
      <Checkbox label="Nothing is earned while the root is wrong" checked={rubric.rootFirst} onChange={(e) => set({ rootFirst: e.target.checked })} />
      <Checkbox label="The numeral counts as a whole" hint="Root, quality and target earn together or not at all." checked={rubric.wholeNumeral} onChange={(e) => set({ wholeNumeral: e.target.checked })} />
      <Checkbox label="Capitals and small letters are not told apart" checked={rubric.caseIgnored} onChange={(e) => set({ caseIgnored: e.target.checked })} />
      <Checkbox label="A wrong accidental before the numeral voids the label" hint="Otherwise it costs half of the root." checked={rubric.accidentalVoids} onChange={(e) => set({ accidentalVoids: e.target.checked })} />
      <p className="mt-1 text-micro text-ink-soft">Notes that only sound alike never count: the spelling decides.</p>
    </Choices>
  );
}

function SixFours({ rubric, set }: { rubric: Rubric; set: Set }) {
  const change = (sixFour: Partial<Rubric['sixFour']>) => set({ sixFour: { ...rubric.sixFour, ...sixFour } });
  return (
    <Choices legend="A cadential six-four may also be written">
      <Checkbox label="I6/4" checked={rubric.sixFour.asTonic} onChange={(e) => change({ asTonic: e.target.checked })} />
      <Checkbox label="V6/4" checked={rubric.sixFour.asDominant} onChange={(e) => change({ asDominant: e.target.checked })} />
      <Checkbox label="V6/4 only when the dominant follows in the answer" checked={rubric.sixFour.tiedToNext} disabled={!rubric.sixFour.asDominant} onChange={(e) => change({ tiedToNext: e.target.checked })} />
    </Choices>
  );
}

function Credits({ rubric, open, keysGiven, set }: { rubric: Rubric; open: boolean; keysGiven: boolean; set: Set }) {
  return (
    <div className="flex flex-col gap-4">
      <Choices legend="A wrong seventh is a matter of">
        <Radio name="seventh-in" label="the chord’s quality" checked={rubric.seventhIn === 'quality'} onChange={() => set({ seventhIn: 'quality' })} />
        <Radio name="seventh-in" label="its figures" checked={rubric.seventhIn === 'inversion'} onChange={() => set({ seventhIn: 'inversion' })} />
      </Choices>
      <div className="grid gap-4 sm:grid-cols-2">
        <NumberField label="What is left of it then" hint="0 to 1: V for V7" value={rubric.seventhCredit} min={0} max={1} onChange={(seventhCredit) => set({ seventhCredit })} />
        <NumberField label="Applied to the wrong chord" hint="0 to 1: V7/IV for V7/V" value={rubric.targetCredit} min={0} max={1} onChange={(targetCredit) => set({ targetCredit })} />
        {keysGiven ? null : <NumberField label="Tonicised against modulated" hint="0 to 1: V7/V for V7 in the new key" value={rubric.frameCredit} min={0} max={1} onChange={(frameCredit) => set({ frameCredit })} />}
        {open ? <NumberField label="A change may be off by" hint="in quarter notes" value={rubric.boundaryTolerance} min={0} max={8} onChange={(boundaryTolerance) => set({ boundaryTolerance })} /> : null}
      </div>
      {keysGiven ? null : (
        <Checkbox label="Follow a wrong key through" hint="A numeral that is right in the key’s key earns its parts although the student is in another." checked={rubric.followThrough} onChange={(e) => set({ followThrough: e.target.checked })} />
      )}
    </div>
  );
}
