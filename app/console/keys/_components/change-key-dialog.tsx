'use client';

import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { issueKeyBody } from '@/openapi/operations/keys';
import { ProblemError, request } from '@/app/_api/client';
import { Button } from '@/app/_components/button';
import { Dialog } from '@/app/_components/dialog';
import { FailureNotice } from '@/app/_components/failure-notice';
import { Notice } from '@/app/_components/notice';
import { resolveWith, showFieldErrors } from '@/app/_forms/resolve-with';
import type { Key } from './key';
import { KeyFields } from './key-fields';
import { bodyOf, keyLabels, valuesOf, type KeyValues } from './key-values';

interface ChangeKeyDialogProps {
  readonly changing: Key;
  readonly onChanged: () => void;
  readonly onClose: () => void;
}

export function ChangeKeyDialog({ changing, onChanged, onClose }: ChangeKeyDialogProps) {
  // The version the form was opened on: a list that refreshes behind it must not move the target.
  const [opened] = useState(changing);
  const [failure, setFailure] = useState<ProblemError | null>(null);
  const form = useForm({
    defaultValues: valuesOf(opened),
    resolver: resolveWith<KeyValues, typeof issueKeyBody>(issueKeyBody, keyLabels, bodyOf),
  });

  const submit = form.handleSubmit(async (body) => {
    setFailure(null);
    try {
      await request('PATCH', `/keys/${opened.id}`, changedPart(opened, body, form.formState.dirtyFields), { 'If-Match': `"${opened.version}"` });
      onChanged();
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
    <Dialog title={`Change ${opened.name}`} wide onClose={onClose}>
      <form onSubmit={submit} noValidate>
        <KeyFields form={form} />
        {failure?.problem.status === 412 ? (
          <Notice tone="warning" title="Somebody changed this key meanwhile." className="mt-5">
            Close this, look at what it says now, and repeat your change if it is still wanted.
          </Notice>
        ) : (
          failure && <FailureNotice error={failure} className="mt-5" />
        )}
        <div className="mt-6 flex flex-wrap items-center gap-x-3 gap-y-2">
          <Button type="submit" busy={form.formState.isSubmitting} disabled={!form.formState.isDirty}>
            {form.formState.isSubmitting ? 'Changing' : 'Change key'}
          </Button>
          <Button variant="ghost" onClick={onClose}>
            Cancel
          </Button>
          <span className="text-fine text-ash">Holds from the next request on.</span>
        </div>
      </form>
    </Dialog>
  );
}

/** Only what was touched: a field left alone must not undo what the key has become since. */
function changedPart<Body extends object>(key: Key, body: Body, dirty: Partial<Record<keyof KeyValues, unknown>>): Partial<Body> {
  const touched = new Set<string>(Object.keys(dirty).map((field) => (field === 'expires' || field === 'expires_on' ? 'expires_at' : field)));
  return Object.fromEntries(Object.entries(body).filter(([field]) => touched.has(field) && field in key)) as Partial<Body>;
}
