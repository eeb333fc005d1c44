'use client';

/** The form's state: react-hook-form holds the values, the calculation's own schema judges them. */
import { useMemo } from 'react';
import { set, useForm, type FieldErrors, type FieldValues, type Resolver, type UseFormReturn } from 'react-hook-form';
import { z } from 'zod';
import type { Calculation } from '@/lib/solvers/calculation';
import { checkForm } from './check-form';
import type { GroupField } from './field';
import { formOf } from './fields-of-schema';
import { valuesOf } from './form-values';

// Without this zod tries `new Function`, which the page's security policy refuses and reports.
z.config({ jitless: true });

export interface BenchForm {
  readonly field: GroupField;
  readonly form: UseFormReturn<FieldValues, unknown, { input: unknown }>;
  /** Fills the form with an input, as it came from an example or a link. */
  load(input: unknown): void;
}

export function useBenchForm(calculation: Calculation): BenchForm {
  const field = useMemo(() => formOf(calculation.input), [calculation]);
  const resolver = useMemo(() => resolverOf(calculation, field), [calculation, field]);
  const form = useForm<FieldValues, unknown, { input: unknown }>({ resolver, defaultValues: { input: valuesOf(field, calculation.examples[0].input) } });
  return { field, form, load: (input) => form.reset({ input: valuesOf(field, input) }) };
}

function resolverOf(calculation: Calculation, field: GroupField): Resolver<FieldValues, unknown, { input: unknown }> {
  return (values) => {
    const { input, errors } = checkForm(calculation.input, field, values.input);
    if (errors.length === 0) return { values: { input }, errors: {} };
    const placed: FieldErrors<FieldValues> = {};
    for (const { path, code, message } of errors) set(placed, path, { type: code, message });
    return { values: {}, errors: placed } as never;
  };
}
