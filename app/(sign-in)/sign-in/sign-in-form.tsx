'use client';

import { useForm } from 'react-hook-form';
import { useState } from 'react';
import { signInBody } from '@/openapi/operations/session';
import { ProblemError, request } from '@/app/_api/client';
import { Button } from '@/app/_components/button';
import { FailureNotice } from '@/app/_components/failure-notice';
import { Notice } from '@/app/_components/notice';
import { TextField } from '@/app/_components/text-field';
import { resolveWith, showFieldErrors } from '@/app/_forms/resolve-with';
import { formatWait } from '@/app/_format/times';

interface SignInValues {
  email: string;
  password: string;
}

const labels = { email: 'E-mail', password: 'Password' };

export function SignInForm({ next }: { readonly next: string | null }) {
  const [refusal, setRefusal] = useState<ProblemError | null>(null);
  const { register, handleSubmit, setError, resetField, setFocus, formState } = useForm<SignInValues, unknown, SignInValues>({
    defaultValues: { email: '', password: '' },
    resolver: resolveWith<SignInValues, typeof signInBody>(signInBody, labels),
  });
  const { errors, isSubmitting, isSubmitSuccessful } = formState;

  const submit = handleSubmit(async (body) => {
    setRefusal(null);
    try {
      await request('POST', '/session', body);
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error;
      if (showFieldErrors(error, labels, setError)) return;
      setRefusal(error);
      // The form stays as it was except for the secret: an address is rarely what was mistyped.
      if (error.problem.status === 401) {
        resetField('password');
        setFocus('password');
      }
      setError('root', { type: error.problem.code });
      return;
    }
    // A full load: what an earlier member left in memory is gone.
    window.location.assign(next ?? '/console');
  });

  return (
    <form onSubmit={submit} noValidate className="grid gap-4">
      <TextField label="E-mail" type="email" autoComplete="username" autoFocus inputMode="email" spellCheck={false} error={errors.email?.message} {...register('email')} />
      <TextField label="Password" type="password" autoComplete="current-password" error={errors.password?.message} {...register('password')} />
      {refusal && <Refusal error={refusal} />}
      <div className="mt-1">
        <Button type="submit" busy={isSubmitting || isSubmitSuccessful}>
          {isSubmitting ? 'Signing in' : 'Sign in'}
        </Button>
      </div>
    </form>
  );
}

function Refusal({ error }: { readonly error: ProblemError }) {
  const { problem, retryAfterSeconds } = error;
  const wait = retryAfterSeconds === null ? 'a moment' : formatWait(retryAfterSeconds);
  switch (problem.status) {
    case 401:
      return <Notice tone="error" title="E-mail or password is wrong.">Check both and try again.</Notice>;
    case 429:
      return <Notice tone="warning" title="Too many tries.">Sign-in opens again in {wait}.</Notice>;
    case 503:
      return <Notice tone="warning" title="The service cannot answer now.">Nothing is wrong with what you typed. Try again in {wait}.</Notice>;
    default:
      return <FailureNotice error={error} />;
  }
}
