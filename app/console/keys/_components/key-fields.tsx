'use client';

import type { UseFormReturn } from 'react-hook-form';
import { CheckboxField } from '@/app/_components/checkbox-field';
import { SelectField } from '@/app/_components/select-field';
import { TextAreaField } from '@/app/_components/text-area-field';
import { TextField } from '@/app/_components/text-field';
import { scopeMeanings, scopes } from '@/lib/auth/permissions';
import { keyLabels, type KeyValues } from './key-values';

/** The fields that issuing and changing share. */
export function KeyFields<Body>({ form }: { readonly form: UseFormReturn<KeyValues, unknown, Body> }) {
  const { register, watch, formState } = form;
  const { errors } = formState;
  const atMoment = watch('expires') === 'at';
  return (
    <div className="grid gap-4">
      <TextField label={keyLabels.name} autoComplete="off" spellCheck={false} help="What the key is for, as the call log will show it." error={errors.name?.message} {...register('name')} />

      <fieldset aria-describedby={errors.scopes ? 'scopes-error' : undefined}>
        <legend className="mb-1.5 text-small font-[550]">{keyLabels.scopes}</legend>
        <div className="grid gap-1.5">
          {scopes.map((scope) => (
            <CheckboxField
              key={scope}
              value={scope}
              label={
                <>
                  <span className="inline-block min-w-[9.5rem] font-mono text-[13px]">{scope}</span> <span className="text-ash">{scopeMeanings[scope]}</span>
                </>
              }
              {...register('scopes')}
            />
          ))}
        </div>
        {errors.scopes && (
          <p id="scopes-error" role="alert" className="mt-1 text-fine text-garnet">
            Choose at least one scope.
          </p>
        )}
      </fieldset>

      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label={keyLabels.monthly_unit_quota} mono inputMode="numeric" unit="units" help="In a calendar month (UTC)." error={errors.monthly_unit_quota?.message} {...register('monthly_unit_quota')} />
        <TextField label={keyLabels.requests_per_minute} mono inputMode="numeric" unit="requests/min" help="Evenly refilled." error={errors.requests_per_minute?.message} {...register('requests_per_minute')} />
      </div>

      <div className="grid gap-4 sm:grid-cols-2">
        <SelectField label="Expires" error={atMoment ? undefined : errors.expires_at?.message} {...register('expires')}>
          <option value="30">in 30 days</option>
          <option value="90">in 90 days</option>
          <option value="365">in a year</option>
          <option value="at">at a date and time</option>
          <option value="never">never</option>
        </SelectField>
        {atMoment && <TextField label="Date and time" type="datetime-local" mono help="Your local time." error={errors.expires_at && 'Give a date and a time.'} {...register('expires_on')} />}
      </div>

      <TextAreaField
        label={keyLabels.allowed_addresses}
        mono
        rows={2}
        spellCheck={false}
        help="One address or network a line, such as 198.51.100.0/24. Empty: the key works from anywhere."
        error={addressError(errors.allowed_addresses)}
        {...register('allowed_addresses')}
      />
    </div>
  );
}

function addressError(error: { readonly message?: string; readonly type?: string } | undefined): string | undefined {
  if (!error) return undefined;
  return error.type === 'too_big' ? error.message : 'Each line must be an address such as 198.51.100.7 or a network such as 198.51.100.0/24.';
}
