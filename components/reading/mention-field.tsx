'use client';

import { type ComponentProps, type KeyboardEvent, useId, useRef, useState } from 'react';
import { TextArea, classNames } from '@/components/ui';

interface MentionFieldProps extends Omit<ComponentProps<typeof TextArea>, 'onChange' | 'value'> {
  readonly value: string;
  onChange(value: string): void;
  /** Who can be named; asked at the first `@`. */
  findPeople(): Promise<readonly string[]>;
}

const SHOWN = 6;

/** A text in which `@` offers the people who can be named: arrows and Enter, or a press, choose one. */
export function MentionField({ value, onChange, findPeople, onKeyDown, ...rest }: MentionFieldProps) {
  const [people, setPeople] = useState<readonly string[]>([]);
  const [begun, setBegun] = useState<string | null>(null);
  const [at, setAt] = useState(0);
  const field = useRef<HTMLTextAreaElement>(null);
  const listId = useId();
  const found = begun === null ? [] : people.filter((name) => name.toLocaleLowerCase('en').includes(begun)).slice(0, SHOWN);
  const active = found[Math.min(at, found.length - 1)];

  const look = async (text: string, caret: number) => {
    const query = /(?:^|\s)@([\p{L}\p{M} .'’-]{0,40})$/u.exec(text.slice(0, caret));
    setBegun(query ? (query[1] as string).toLocaleLowerCase('en') : null);
    setAt(0);
    if (query && people.length === 0) setPeople(await findPeople());
  };
  const choose = (name: string) => {
    const caret = field.current?.selectionStart ?? value.length;
    const head = value.slice(0, caret).replace(/@[^@]*$/u, `@${name} `);
    onChange(head + value.slice(caret));
    setBegun(null);
    field.current?.focus();
  };
  const press = (event: KeyboardEvent<HTMLTextAreaElement>) => {
    event.stopPropagation();
    if (!active) return onKeyDown?.(event);
    if (event.key === 'ArrowDown') setAt((n) => Math.min(found.length - 1, n + 1));
    else if (event.key === 'ArrowUp') setAt((n) => Math.max(0, n - 1));
    else if ((event.key === 'Enter' && !event.ctrlKey && !event.metaKey) || event.key === 'Tab') choose(active);
    else if (event.key === 'Escape') setBegun(null);
    else return onKeyDown?.(event);
    event.preventDefault();
  };

  return (
    <div className="flex flex-col">
      <TextArea
        {...rest}
        ref={field}
        value={value}
        role="combobox"
        aria-autocomplete="list"
        aria-expanded={found.length > 0}
        aria-controls={listId}
        aria-activedescendant={active ? `${listId}-${found.indexOf(active)}` : undefined}
        onChange={(event) => {
          onChange(event.target.value);
          void look(event.target.value, event.target.selectionStart);
        }}
        onBlur={() => setBegun(null)}
        onKeyDown={press}
      />
      <div role="listbox" id={listId} aria-label="People to name" className={classNames('border border-t-0 border-rule-strong bg-sheet', found.length === 0 && 'hidden')}>
        {found.map((name, i) => (
          <div
            key={name}
            id={`${listId}-${i}`}
            role="option"
            aria-selected={name === active}
            // Before the field loses the keyboard.
            onMouseDown={(event) => {
              event.preventDefault();
              choose(name);
            }}
            className={classNames('min-h-7 px-2.5 py-0.5', name === active && 'bg-selection')}
          >
            {name}
          </div>
        ))}
      </div>
    </div>
  );
}
