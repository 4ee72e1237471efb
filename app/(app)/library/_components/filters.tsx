'use client';

import Form from 'next/form';
import Link from 'next/link';
import { useRef } from 'react';
import { Checkbox, Field, Input, Select } from '@/components/ui';
import type { LibraryQuery } from '../filter';

export interface Choice {
  readonly value: string;
  readonly label: string;
}

interface FiltersProps {
  readonly view: LibraryQuery;
  readonly narrowed: boolean;
  readonly composers: readonly Choice[];
  readonly keys: readonly Choice[];
  readonly people: readonly Choice[];
}

const TYPING_PAUSE_MS = 350;

const STATES: readonly Choice[] = [
  { value: 'ready', label: 'ready' },
  { value: 'uncut', label: 'ready, no excerpt yet' },
  { value: 'in-work', label: 'being read' },
  { value: 'refused', label: 'refused' },
];

/** Search and facets. A plain form with an address of its own; it sends itself as soon as something changes. */
export function Filters({ view, narrowed, composers, keys, people }: FiltersProps) {
  const form = useRef<HTMLFormElement>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const send = (pause = 0) => {
    clearTimeout(timer.current);
    timer.current = setTimeout(() => form.current?.requestSubmit(), pause);
  };
  return (
    <Form ref={form} action="/library" role="search" aria-label="Library" scroll={false} className="mb-4 grid grid-cols-2 gap-x-4 gap-y-3 lg:grid-cols-[minmax(0,1.6fr)_repeat(4,minmax(0,1fr))]">
      {view.sort === 'added' ? null : <input type="hidden" name="sort" value={view.sort} />}
      {view.order ? <input type="hidden" name="order" value={view.order} /> : null}
      <Field label="Search" className="col-span-2 lg:col-span-1">
        <Input type="search" name="q" defaultValue={view.q} placeholder="Title, composer, work, purpose" onChange={() => send(TYPING_PAUSE_MS)} />
      </Field>
      <Facet label="Composer" name="composer" value={view.composer} choices={composers} onChange={send} />
      <Facet label="Begins in" name="key" value={view.key} choices={keys} onChange={send} />
      <Facet label="State" name="state" value={view.state} choices={STATES} onChange={send} />
      <Facet label="Brought in by" name="by" value={view.by} choices={people} onChange={send} />
      <div className="col-span-full flex flex-wrap items-center justify-between gap-x-6">
        <Checkbox
          name="diminished"
          value="1"
          defaultChecked={view.diminished !== null}
          onChange={() => send()}
          label="Only with secondary diminished or half-diminished sevenths"
        />
        {narrowed ? <Link href="/library" className="link min-h-6 content-center text-small">Show the whole library</Link> : null}
        <noscript><button type="submit" className="link">Search</button></noscript>
      </div>
    </Form>
  );
}

interface FacetProps {
  readonly label: string;
  readonly name: string;
  readonly value: string | null;
  readonly choices: readonly Choice[];
  readonly onChange: () => void;
}

/** Unset, the select sends an empty value, which the address leaves aside when it is read. */
function Facet({ label, name, value, choices, onChange }: FacetProps) {
  return (
    <Field label={label}>
      <Select name={name} defaultValue={value ?? ''} onChange={() => onChange()}>
        <option value="">any</option>
        {choices.map((choice) => <option key={choice.value} value={choice.value}>{choice.label}</option>)}
      </Select>
    </Field>
  );
}
