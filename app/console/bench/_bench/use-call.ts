'use client';

import { useState } from 'react';
import type { FieldValues, UseFormReturn } from 'react-hook-form';
import { ProblemError, request } from '@/app/_api/client';
import { calculationPath, type Calculation } from '@/lib/solvers/calculation';
import type { Answer } from '../_answer/answer';
import { placeErrors } from '../_form/check-form';
import type { GroupField } from '../_form/field';

export interface Call {
  readonly state: 'idle' | 'waiting' | 'answered' | 'refused';
  /** Of the last call that was answered; stays while the next one runs. */
  readonly answered: { readonly input: unknown; readonly answer: Answer } | null;
  readonly error: unknown;
  send(input: unknown): Promise<void>;
}

export function useCall(calculation: Calculation, field: GroupField, form: UseFormReturn<FieldValues, unknown, { input: unknown }>): Call {
  const [call, setCall] = useState<Omit<Call, 'send'>>({ state: 'idle', answered: null, error: null });

  async function send(input: unknown) {
    setCall((last) => ({ ...last, state: 'waiting', error: null }));
    try {
      const answer = await request<Answer>('POST', `/${calculationPath(calculation)}`, input);
      setCall({ state: 'answered', answered: { input, answer }, error: null });
    } catch (error) {
      setCall((last) => ({ ...last, state: 'refused', error }));
      if (error instanceof ProblemError) showInPlace(error);
    }
  }

  /** What only the solver can know comes back with pointers, and stands beside the fields like the rest. */
  function showInPlace({ problem }: ProblemError) {
    const placed = placeErrors(field, form.getValues('input'), problem.errors ?? []);
    placed.forEach(({ path, code, message }, index) => form.setError(path, { type: code, message }, { shouldFocus: index === 0 }));
  }

  return { ...call, send };
}
