'use client';

import Link from 'next/link';
import { Checkbox, Field, Input, Select } from '@/components/ui';
import type { LibraryQuery } from '../filter';
import { type Facets, useFilterDraft } from './use-filter-draft';

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

const STATES: readonly Choice[] = [
  { value: 'ready', label: 'ready' },
  { value: 'uncut', label: 'ready, no excerpt yet' },
  { value: 'in-work', label: 'being read' },
  { value: 'refused', label: 'refused' },
];

/** Search and facets. Every view has an address, which follows the controls. */
export function Filters({ view, narrowed, composers, keys, people }: FiltersProps) {
  const { draft, change } = useFilterDraft(view);
  const facet = (name: Exclude<keyof Facets, 'q' | 'diminished'>, choices: readonly Choice[]) => ({
    value: draft[name],
    choices,
    onChoose: (value: string | null) => change({ [name]: value }),
  });
  return (
    <form action="/library" role="search" aria-label="Library" onSubmit={(event) => event.preventDefault()} className="mb-4 grid grid-cols-2 gap-x-4 gap-y-3 lg:grid-cols-[minmax(0,1.6fr)_repeat(4,minmax(0,1fr))]">
      <Field label="Search" className="col-span-2 lg:col-span-1">
        <Input type="search" value={draft.q} maxLength={200} placeholder="Title, composer, work, purpose" onChange={(event) => change({ q: event.target.value }, 'typing')} />
      </Field>
      <Facet label="Composer" {...facet('composer', composers)} />
      <Facet label="Begins in" {...facet('key', keys)} />
      <Facet label="State" {...facet('state', STATES)} />
      <Facet label="Brought in by" {...facet('by', people)} />
      <div className="col-span-full flex flex-wrap items-center justify-between gap-x-6">
        <Checkbox
          checked={draft.diminished !== null}
          onChange={(event) => change({ diminished: event.target.checked ? '1' : null })}
          label="Only with secondary diminished or half-diminished sevenths"
        />
        {narrowed ? <Link href="/library" className="link min-h-6 content-center text-small">Show the whole library</Link> : null}
      </div>
    </form>
  );
}

interface FacetProps {
  readonly label: string;
  readonly value: string | null;
  readonly choices: readonly Choice[];
  readonly onChoose: (value: string | null) => void;
}

function Facet({ label, value, choices, onChoose }: FacetProps) {
  return (
    <Field label={label}>
      <Select value={value ?? ''} onChange={(event) => onChoose(event.target.value || null)}>
        <option value="">any</option>
        {choices.map((choice) => <option key={choice.value} value={choice.value}>{choice.label}</option>)}
      </Select>
    </Field>
  );
}
