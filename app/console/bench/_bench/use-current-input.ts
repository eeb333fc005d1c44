'use client';

import { useDeferredValue, useMemo } from 'react';
import { useWatch, type FieldValues, type UseFormReturn } from 'react-hook-form';
import type { Calculation } from '@/lib/solvers/calculation';
import { formatCount } from '@/app/_format/numbers';
import type { GroupField } from '../_form/field';
import { readForm } from '../_form/read-form';

export interface CurrentInput {
  /** Undefined while something typed cannot be read or would be refused. */
  readonly input: unknown;
  /** "costs 2 units". */
  readonly cost: string;
}

/** What the form would send now, and what that would cost; follows the typing at the browser's leisure. */
export function useCurrentInput(calculation: Calculation, field: GroupField, form: UseFormReturn<FieldValues, unknown, { input: unknown }>): CurrentInput {
  const values = useDeferredValue(useWatch({ control: form.control }));
  return useMemo(() => {
    const { input, complaints } = readForm(field, values.input);
    const parsed = complaints.length === 0 ? calculation.input.safeParse(input) : undefined;
    if (!parsed?.success) return { input: undefined, cost: calculation.cost.rule };
    const units = calculation.cost.units(parsed.data);
    return { input, cost: `costs ${formatCount(units)} ${units === 1 ? 'unit' : 'units'}` };
  }, [calculation, field, values]);
}
