'use client';

import { useState } from 'react';
import { Field, Input } from '@/components/ui';

interface NumberFieldProps {
  readonly label: string;
  readonly hint?: string;
  readonly value: number;
  readonly min: number;
  readonly max: number;
  readonly error?: string | undefined;
  readonly disabled?: boolean;
  readonly labelHidden?: boolean;
  readonly className?: string;
  onChange(value: number): void;
}

/** A number that may be half typed: the text stays as typed, the value follows whenever it is a number within bounds. */
export function NumberField({ label, hint, value, min, max, error, disabled, labelHidden, className, onChange }: NumberFieldProps) {
  const [text, setText] = useState<string | null>(null);
  const typed = text === null ? value : Number(text.replace(',', '.'));
  const isWrong = text !== null && (text.trim() === '' || !(typed >= min && typed <= max));
  const change = (next: string) => {
    setText(next);
    const number = Number(next.replace(',', '.'));
    if (next.trim() !== '' && number >= min && number <= max) onChange(number);
  };
  return (
    <Field label={label} error={error ?? (isWrong ? `Between ${min} and ${max}.` : undefined)} {...(hint ? { hint } : {})} {...(labelHidden ? { labelHidden } : {})} {...(className ? { className } : {})}>
      <Input
        type="text"
        inputMode="decimal"
        value={text ?? String(value)}
        disabled={disabled}
        onChange={(event) => change(event.target.value)}
        onBlur={() => setText(isWrong ? text : null)}
        className="tabular max-w-28"
      />
    </Field>
  );
}
