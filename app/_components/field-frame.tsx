'use client';

import { useId, type ReactNode } from 'react';

/** What every field has around its control. */
export interface FieldProps {
  readonly label: ReactNode;
  readonly help?: ReactNode;
  /** Stands in place of the help, and marks the control as invalid. */
  readonly error?: string | null;
  /** Kept for assistive technology only; for filters whose value says what they are. */
  readonly labelHidden?: boolean;
  readonly className?: string;
}

interface ControlAttributes {
  readonly id: string;
  readonly 'aria-invalid'?: true;
  readonly 'aria-describedby'?: string;
}

interface FieldFrameProps extends FieldProps {
  readonly children: (attributes: ControlAttributes) => ReactNode;
}

/** Label above, control, help or error beneath, tied together for assistive technology. */
export function FieldFrame({ label, help, error, labelHidden, className = '', children }: FieldFrameProps) {
  const id = useId();
  const note = error ?? help;
  const noteId = `${id}-note`;
  return (
    <div className={`min-w-0 ${className}`}>
      <label htmlFor={id} className={labelHidden ? 'sr-only' : 'mb-[5px] block text-small font-[550]'}>
        {label}
      </label>
      {children({ id, 'aria-invalid': error ? true : undefined, 'aria-describedby': note ? noteId : undefined })}
      {note && (
        <p id={noteId} className={`mt-1 text-fine wrap-anywhere ${error ? 'text-garnet' : 'text-ash'}`} role={error ? 'alert' : undefined}>
          {note}
        </p>
      )}
    </div>
  );
}

/** The box around what is typed or chosen. */
export function boxLook(invalid: boolean): string {
  const border = invalid ? 'border-garnet' : 'border-edge hover:border-ash';
  return `flex h-row w-full items-center rounded-field border bg-sheet text-[14px] focus-within:outline-2 focus-within:outline-offset-1 focus-within:outline-copper has-disabled:bg-wash has-disabled:text-ash ${border}`;
}
