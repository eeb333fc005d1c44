'use client';

import { useId } from 'react';

interface ChoiceProps<Value extends string> {
  readonly label: string;
  readonly value: Value;
  readonly options: readonly (readonly [Value, string])[];
  readonly onChange: (value: Value) => void;
}

/** A few exclusive words in a line; the chosen one stands on the pair. Radio buttons to the keyboard. */
export function Choice<Value extends string>({ label, value, options, onChange }: ChoiceProps<Value>) {
  const name = useId();
  return (
    <fieldset className="flex gap-4 text-small">
      <legend className="sr-only">{label}</legend>
      {options.map(([option, title]) => (
        <label
          key={option}
          className={`relative cursor-pointer pb-2 has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-copper ${option === value ? 'font-[550]' : 'text-ash hover:text-ink'}`}
        >
          <input type="radio" name={name} value={option} checked={option === value} onChange={() => onChange(option)} className="sr-only" />
          {title}
          {option === value && <span aria-hidden className="pair absolute inset-x-0 bottom-0 text-copper" />}
        </label>
      ))}
    </fieldset>
  );
}
