'use client';

import type { ComponentProps } from 'react';
import { FieldFrame, type FieldProps } from './field-frame';

interface TextAreaFieldProps extends FieldProps, Omit<ComponentProps<'textarea'>, 'className' | 'id'> {
  readonly mono?: boolean;
}

export function TextAreaField({ label, help, error, labelHidden, className, mono = false, ...area }: TextAreaFieldProps) {
  return (
    <FieldFrame label={label} help={help} error={error} labelHidden={labelHidden} className={className}>
      {(attributes) => (
        <textarea
          rows={3}
          {...area}
          {...attributes}
          className={`block w-full rounded-field border bg-sheet px-[11px] py-2 text-[14px] placeholder:text-ash focus:outline-2 focus:outline-offset-1 focus:outline-copper ${error ? 'border-garnet' : 'border-edge hover:border-ash'} ${mono ? 'font-mono' : ''}`}
        />
      )}
    </FieldFrame>
  );
}
