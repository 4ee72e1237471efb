'use client';

import { useState } from 'react';
import { Field, Input, Radio } from '@/components/ui';
import type { Source } from './assign-form';

export interface ExcerptChoice {
  readonly excerptId: string;
  readonly excerptTitle: string;
  readonly scoreTitle: string;
  readonly composer: string;
}

/** The excerpts that have a reading, each once. */
export function excerptsOf(readings: readonly Source[]): ExcerptChoice[] {
  return [...new Map(readings.map((reading) => [reading.excerptId, reading])).values()];
}

interface ExcerptListProps {
  readonly excerpts: readonly ExcerptChoice[];
  readonly chosen: string;
  onChoose(excerptId: string): void;
}

/** From this many on, a filter helps. */
const MANY = 8;

export function ExcerptList({ excerpts, chosen, onChoose }: ExcerptListProps) {
  const [wanted, setWanted] = useState('');
  const words = wanted.trim().toLowerCase();
  const shown = excerpts.filter((one) => `${one.composer} ${one.scoreTitle} ${one.excerptTitle}`.toLowerCase().includes(words));
  return (
    <fieldset>
      <legend className="mb-2 text-small font-medium">Excerpt</legend>
      {excerpts.length >= MANY ? (
        <Field label="Find an excerpt" className="mb-3 max-w-sm">
          <Input type="search" value={wanted} onChange={(event) => setWanted(event.target.value)} />
        </Field>
      ) : null}
      <ul className="max-h-[60vh] divide-y divide-rule overflow-y-auto border-y border-rule-strong">
        {shown.map(({ excerptId, excerptTitle, scoreTitle, composer }) => (
          <li key={excerptId} className="py-1.5 pl-1">
            <Radio
              name="excerpt-choice"
              value={excerptId}
              checked={excerptId === chosen}
              onChange={() => onChoose(excerptId)}
              label={<span className="font-book">{excerptTitle}</span>}
              hint={[composer, scoreTitle].filter(Boolean).join(', ')}
            />
          </li>
        ))}
      </ul>
      {shown.length === 0 ? <p className="mt-2 text-ink-soft">No excerpt by these words.</p> : null}
    </fieldset>
  );
}
