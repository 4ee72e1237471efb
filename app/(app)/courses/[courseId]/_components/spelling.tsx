'use client';

import { useState } from 'react';
import { useAct } from '@/app/_components/use-act';
import { Button, Field, Select, WarningNote } from '@/components/ui';
import { type ConventionSheet, CONVENTION_PRESETS, DEFAULT_CONVENTIONS } from '@/lib/theory/conventions';
import { chooseConventions } from '../../actions';
import { CONVENTION_CHOICES, PRESET_NAMES } from './convention-choices';
import { ConventionSamples } from './convention-samples';
import { TrySpelling } from './try-spelling';

interface SpellingProps {
  readonly courseId: string;
  readonly conventions: ConventionSheet | null;
  /** May change it. */
  readonly runs: boolean;
}

/** The course's convention sheet: a ready-made one or choice by choice, with what it prints beside it. */
export function Spelling({ courseId, conventions, runs }: SpellingProps) {
  const stored = conventions ?? DEFAULT_CONVENTIONS;
  const [sheet, setSheet] = useState<ConventionSheet>(stored);
  const [busy, act] = useAct();
  const isChanged = JSON.stringify(sheet) !== JSON.stringify(stored);
  if (!runs) return <ConventionSamples sheet={stored} />;
  return (
    <div className="grid gap-8 lg:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)]">
      <form
        className="flex flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          void act(() => chooseConventions({ courseId, conventions: sheet }), 'Labels are spelled this way now.');
        }}
      >
        <Field label="Start from">
          <Select value={presetOf(sheet)} onChange={(event) => setSheet(presetNamed(event.target.value) ?? sheet)}>
            <option value="">own choices</option>
            {Object.entries(PRESET_NAMES).map(([name, label]) => <option key={name} value={name}>{label}</option>)}
          </Select>
        </Field>
        {CONVENTION_CHOICES.map(({ field, label, options }) => (
          <Field key={field} label={label}>
            <Select value={sheet[field]} onChange={(event) => setSheet({ ...sheet, [field]: event.target.value })}>
              {options.map(({ value, words }) => <option key={value} value={value}>{words}</option>)}
            </Select>
          </Field>
        ))}
        <div><Button type="submit" kind="primary" busy={busy} disabled={!isChanged}>Spell labels this way</Button></div>
      </form>
      <div>
        <h3 className="caps mb-2 text-small text-ink-soft">In print</h3>
        <ConventionSamples sheet={sheet} />
        <TrySpelling sheet={sheet} />
        <WarningNote className="mt-4">
          The sheet decides how labels are printed and how typed ones are read; readings that exist keep their chords.
        </WarningNote>
      </div>
    </div>
  );
}

function presetOf(sheet: ConventionSheet): string {
  const entry = Object.entries(CONVENTION_PRESETS).find(([, preset]) => JSON.stringify(sorted(preset)) === JSON.stringify(sorted(sheet)));
  return entry?.[0] ?? '';
}

function sorted(sheet: ConventionSheet): [string, string][] {
  return Object.entries(sheet).sort(([a], [b]) => a.localeCompare(b));
}

function presetNamed(name: string): ConventionSheet | null {
  return Object.entries(CONVENTION_PRESETS).find(([key]) => key === name)?.[1] ?? null;
}
