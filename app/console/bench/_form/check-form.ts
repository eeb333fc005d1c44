/**
 * The form's check before a call: texts are read, and the calculation's own schema judges the rest, so
 * that the sentences beside the fields are the API's. Every wrong field at once.
 */
import type { z } from 'zod';
import { fieldErrors, type FieldError } from '@/lib/problems/field-errors';
import type { Field } from './field';
import type { FormValue } from './form-values';
import { placeOf } from './place-of';
import { readForm } from './read-form';

export interface PlacedError {
  readonly path: string;
  readonly code: string;
  readonly message: string;
}

export type FormCheck = { readonly input: unknown; readonly errors: readonly [] } | { readonly input: undefined; readonly errors: readonly PlacedError[] };

export function checkForm(schema: z.ZodType, form: Field, values: FormValue): FormCheck {
  const { input, complaints } = readForm(form, values);
  const parsed = schema.safeParse(input, { reportInput: true });
  if (parsed.success && complaints.length === 0) return { input, errors: [] };
  const unread = complaints.map(({ pointer, detail }) => ({ pointer, code: 'unreadable', detail }));
  const refused = parsed.success ? [] : fieldErrors(parsed.error.issues).filter(({ pointer = '' }) => !complaints.some((each) => pointer === each.pointer || pointer.startsWith(`${each.pointer}/`)));
  const errors = placeErrors(form, values, [...unread, ...refused]);
  return { input: undefined, errors };
}

/** Each complaint where a person can mend it; of several in one place the first. */
export function placeErrors(form: Field, values: FormValue, errors: readonly FieldError[]): PlacedError[] {
  const placed = new Map<string, PlacedError>();
  for (const { pointer = '', code, detail } of errors) {
    const { path, field } = placeOf(form, values, pointer);
    if (!placed.has(path)) placed.set(path, { path, code, message: sentence(detail, pointer, field.title) });
  }
  return [...placed.values()];
}

/** The field's title in place of its wire name, which the form does not show. */
function sentence(detail: string, pointer: string, title: string): string {
  const name = pointer.split('/').at(-1) ?? '';
  return name !== '' && detail.startsWith(`${name} `) ? title + detail.slice(name.length) : detail;
}
