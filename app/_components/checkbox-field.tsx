'use client';

import { useId, type ComponentProps } from 'react';
import type { FieldProps } from './field-frame';

interface CheckboxFieldProps extends Omit<FieldProps, 'labelHidden'>, Omit<ComponentProps<'input'>, 'className' | 'id' | 'type'> {}

/** The label stands beside the box here; the help or error stays beneath it. */
export function CheckboxField({ label, help, error, className = '', ...input }: CheckboxFieldProps) {
  const id = useId();
  const note = error ?? help;
  return (
    <div className={`grid grid-cols-[auto_1fr] gap-x-2.5 ${className}`}>
      <input
        {...input}
        id={id}
        type="checkbox"
        aria-invalid={error ? true : undefined}
        aria-describedby={note ? `${id}-note` : undefined}
        className="mt-[3px] size-[15px] accent-copper"
      />
      <label htmlFor={id} className="text-small">
        {label}
      </label>
      {note && (
        <p id={`${id}-note`} className={`col-start-2 text-fine ${error ? 'text-garnet' : 'text-ash'}`}>
          {note}
        </p>
      )}
    </div>
  );
}
