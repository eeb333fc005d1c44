'use client';

import type { ComponentProps } from 'react';
import { boxLook, FieldFrame, type FieldProps } from './field-frame';

/** The native control: it is right on a phone, on the keyboard and for assistive technology. Options are its children. */
interface SelectFieldProps extends FieldProps, Omit<ComponentProps<'select'>, 'className' | 'id'> {}

export function SelectField({ label, help, error, labelHidden, className, children, ...select }: SelectFieldProps) {
  return (
    <FieldFrame label={label} help={help} error={error} labelHidden={labelHidden} className={className}>
      {(attributes) => (
        <span className={`relative ${boxLook(Boolean(error))}`}>
          <select {...select} {...attributes} className="h-full w-full min-w-0 appearance-none truncate bg-sheet pr-8 pl-[11px] outline-none rounded-field">
            {children}
          </select>
          <svg viewBox="0 0 12 8" aria-hidden className="pointer-events-none absolute right-3 w-[11px] text-ash">
            <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.5" />
          </svg>
        </span>
      )}
    </FieldFrame>
  );
}
