/**
 * One set of sentences: a form is checked by the schema that the API checks by, and its complaints are
 * worded by the function that words the API's, so a person reads the same before and after sending.
 */
import type { FieldErrors, FieldValues, Path, Resolver, UseFormSetError } from 'react-hook-form';
import { z } from 'zod';
import { fieldErrors, type FieldError } from '@/lib/problems/field-errors';
import type { ProblemError } from '../_api/client';

// Without this zod tries `new Function`, which the page's security policy refuses and reports.
z.config({ jitless: true });

/** Names of the fields as the form shows them, by their name in the API. */
export type Labels<Values> = Readonly<Partial<Record<keyof Values, string>>>;

/** `toBody` turns what the controls hold into what the API takes. */
export function resolveWith<Values extends FieldValues, Body extends z.ZodType>(
  schema: Body,
  labels: Labels<Values>,
  toBody: (values: Values) => unknown = (values) => values,
): Resolver<Values, unknown, z.output<Body> & FieldValues> {
  return (values) => {
    const parsed = schema.safeParse(toBody(values), { reportInput: true });
    if (parsed.success) return { values: parsed.data as z.output<Body> & FieldValues, errors: {} };
    const errors: Record<string, { type: string; message: string }> = {};
    for (const error of fieldErrors(parsed.error.issues)) {
      errors[fieldOf(error)] ??= { type: error.code, message: sentence(error, labels) };
    }
    return { values: {}, errors: errors as FieldErrors<Values> };
  };
}

/** Puts the server's complaints beside their fields; answers whether every one found its place. */
export function showFieldErrors<Values extends FieldValues>(error: ProblemError, labels: Labels<Values>, setError: UseFormSetError<Values>): boolean {
  const errors = error.problem.errors ?? [];
  const placed = errors.filter((each) => fieldOf(each) in labels);
  placed.forEach((each, index) => {
    setError(fieldOf(each) as Path<Values>, { type: each.code, message: sentence(each, labels) }, { shouldFocus: index === 0 });
  });
  return errors.length > 0 && placed.length === errors.length;
}

/** The first step of an RFC 6901 pointer: a form's fields lie at the top of its body. */
function fieldOf({ pointer = '' }: FieldError): string {
  return (pointer.split('/')[1] ?? '').replaceAll('~1', '/').replaceAll('~0', '~');
}

function sentence<Values>(error: FieldError, labels: Labels<Values>): string {
  const field = fieldOf(error);
  const label = labels[field as keyof Values];
  if (label && error.detail.endsWith('got ""')) return `${label} is missing`;
  return label && error.detail.startsWith(`${field} `) ? label + error.detail.slice(field.length) : error.detail;
}
