'use client';

import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { issueKeyBody } from '@/openapi/operations/keys';
import { ProblemError, request } from '@/app/_api/client';
import { Button } from '@/app/_components/button';
import { Dialog } from '@/app/_components/dialog';
import { FailureNotice } from '@/app/_components/failure-notice';
import { resolveWith, showFieldErrors } from '@/app/_forms/resolve-with';
import type { IssuedKey } from './key';
import { KeyFields } from './key-fields';
import { bodyOf, keyLabels, newKeyValues, type KeyValues } from './key-values';

interface IssueKeyDialogProps {
  readonly onIssued: (issued: IssuedKey) => void;
  readonly onClose: () => void;
}

export function IssueKeyDialog({ onIssued, onClose }: IssueKeyDialogProps) {
  const [failure, setFailure] = useState<ProblemError | null>(null);
  const form = useForm({
    defaultValues: newKeyValues,
    resolver: resolveWith<KeyValues, typeof issueKeyBody>(issueKeyBody, keyLabels, bodyOf),
  });

  const submit = form.handleSubmit(async (body) => {
    setFailure(null);
    try {
      onIssued(await request<IssuedKey>('POST', '/keys', body));
    } catch (error) {
      if (!(error instanceof ProblemError)) throw error;
      if (error.problem.code === 'name-taken') {
        form.setError('name', { type: 'name-taken', message: 'A key in force has this name already. Choose another.' }, { shouldFocus: true });
      } else if (!showFieldErrors(error, keyLabels, form.setError)) {
        setFailure(error);
      }
    }
  });

  return (
    <Dialog title="Issue a key" wide onClose={onClose}>
      <form onSubmit={submit} noValidate>
        <KeyFields form={form} />
        {failure && <FailureNotice error={failure} className="mt-5" />}
        <div className="mt-6 flex flex-wrap gap-3">
          <Button type="submit" busy={form.formState.isSubmitting}>
            {form.formState.isSubmitting ? 'Issuing' : 'Issue key'}
          </Button>
          <Button variant="ghost" onClick={onClose}>
            Cancel
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
