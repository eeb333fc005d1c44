'use client';

import type { ComponentProps, ReactNode } from 'react';
import { boxLook, FieldFrame, type FieldProps } from './field-frame';

interface TextFieldProps extends FieldProps, Omit<ComponentProps<'input'>, 'className' | 'id'> {
  /** Stands inside the box at its right end. */
  readonly unit?: ReactNode;
  /** Numbers, identifiers and code are set in the mono face. */
  readonly mono?: boolean;
}

export function TextField({ label, help, error, labelHidden, className, unit, mono = false, ...input }: TextFieldProps) {
  return (
    <FieldFrame label={label} help={help} error={error} labelHidden={labelHidden} className={className}>
      {(attributes) => (
        <span className={boxLook(Boolean(error))}>
          <input
            type="text"
            {...input}
            {...attributes}
            className={`h-full min-w-0 flex-1 bg-transparent px-[11px] outline-none placeholder:text-ash ${mono ? 'font-mono' : ''}`}
          />
          {unit && <span className="flex-none pr-[11px] font-mono text-fine text-ash">{unit}</span>}
        </span>
      )}
    </FieldFrame>
  );
}
