'use client';

import type { ReactNode } from 'react';
import { useController, type FieldValues } from 'react-hook-form';
import { useExplaining } from './explain';
import type { Field } from './field';
import { slotOf } from './place-of';

/** What every control of the form is given. */
export interface ControlProps<Kind extends Field = Field> {
  readonly field: Kind;
  /** Path of the field's value in the form. */
  readonly path: string;
  /** In place of the field's own title. */
  readonly label?: string;
  readonly labelHidden?: boolean;
  readonly className?: string;
}

/** Joins a field to the form and says what stands around its control. */
export function useControl({ field, path, label }: ControlProps) {
  const explaining = useExplaining();
  const { field: bound, fieldState } = useController<FieldValues>({ name: slotOf(field, path) });
  return {
    bound,
    error: fieldState.error?.message,
    label: labelOf(label ?? field.title, field),
    help: explaining && field.description ? field.description : undefined,
    description: field.description || undefined,
  };
}

/** What has a default shows it, and needs no word that it may be left alone. */
function labelOf(title: string, { optional, default: fallback }: Field): ReactNode {
  return optional && fallback === undefined ? `${title} (optional)` : title;
}
