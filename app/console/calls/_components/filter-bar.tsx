'use client';

import useSWR from 'swr';
import { SelectField } from '@/app/_components/select-field';
import { TextField } from '@/app/_components/text-field';
import { ranges, statuses, type CallFilters, type Range } from './call-filters';

interface FilterBarProps {
  readonly filters: CallFilters;
  readonly readsKeys: boolean;
  readonly onChange: (changed: Partial<CallFilters>) => void;
}

interface Named {
  readonly id: string;
  readonly name: string;
}

export function FilterBar({ filters, readsKeys, onChange }: FilterBarProps) {
  const { data: keys } = useSWR<{ readonly data: readonly Named[] }>(readsKeys ? '/keys' : null);
  const { data: calculations } = useSWR<{ readonly data: readonly { readonly path: string }[] }>('/calculations');
  const width = 'w-full sm:w-auto sm:min-w-36 sm:flex-1';
  return (
    <div className="mb-4 grid grid-cols-2 gap-3 sm:flex sm:flex-wrap" role="search" aria-label="Filter calls">
      {readsKeys && (
        <SelectField label="Key" labelHidden className={width} value={filters.key} onChange={(event) => onChange({ key: event.target.value })}>
          <option value="">Any caller</option>
          <option value="none">Members, on the Bench</option>
          {withPresent(keys?.data.map(({ id, name }) => [id, name]), filters.key)}
        </SelectField>
      )}
      <SelectField label="Calculation" labelHidden className={width} value={filters.calculation} onChange={(event) => onChange({ calculation: event.target.value })}>
        <option value="">Any calculation</option>
        {withPresent(calculations?.data.map(({ path }) => [path, path]), filters.calculation)}
      </SelectField>
      <SelectField label="Status" labelHidden className={width} value={filters.status} onChange={(event) => onChange({ status: event.target.value })}>
        <option value="">Any status</option>
        {withPresent(Object.entries(statuses), filters.status)}
      </SelectField>
      <SelectField label="Time" labelHidden className={width} value={filters.range} onChange={(event) => onChange({ range: event.target.value as Range })}>
        {Object.entries(ranges).map(([range, title]) => (
          <option key={range} value={range}>
            {title}
          </option>
        ))}
      </SelectField>
      {filters.range === 'own' && (
        <div className="col-span-2 grid w-full gap-3 sm:flex">
          <TextField label="From" labelHidden mono type="datetime-local" className="sm:w-60" value={filters.from} onChange={(event) => onChange({ from: event.target.value })} />
          <TextField label="To" labelHidden mono type="datetime-local" className="sm:w-60" value={filters.to} onChange={(event) => onChange({ to: event.target.value })} />
        </div>
      )}
    </div>
  );
}

/** Options, with the present value among them even before the list is there or when it is not in it. */
function withPresent(options: readonly (readonly [string, string])[] | undefined, present: string) {
  const known = options ?? [];
  const missing = present && present !== 'none' && !known.some(([value]) => value === present) ? [[present, present] as const] : [];
  return [...missing, ...known].map(([value, title]) => (
    <option key={value} value={value}>
      {title}
    </option>
  ));
}
