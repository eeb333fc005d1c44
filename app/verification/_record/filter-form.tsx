import Form from 'next/form';
import Link from 'next/link';
import { Button } from '@/app/_components/button';
import { SelectField } from '@/app/_components/select-field';
import { TextField } from '@/app/_components/text-field';
import { calculationPath, groups } from '@/lib/solvers/calculation';
import { calculations, methods } from '@/lib/solvers/registry';
import { groupTitles } from '@/app/_format/group-titles';
import { isNarrowed, verificationHref, type Filters } from './filters';

/** A form that asks by address: it works without a script, and what it shows can be sent to somebody. */
export function FilterForm({ filters }: { readonly filters: Filters }) {
  return (
    // A new key with new filters: controls that nobody governs would keep what they showed before.
    <Form key={verificationHref(filters)} action="/verification" role="search" aria-label="Filter checks" className="grid items-end gap-3 sm:grid-cols-2 lg:grid-cols-[1fr_1fr_1fr_auto]">
      <SelectField label="Calculation" name="calculation" defaultValue={filters.calculation}>
        <option value="">Any calculation</option>
        {groups.map((group) => (
          <optgroup key={group} label={groupTitles[group]}>
            {calculations
              .filter((each) => each.group === group)
              .map((each) => (
                <option key={each.id} value={calculationPath(each)}>
                  {each.title}
                </option>
              ))}
          </optgroup>
        ))}
      </SelectField>
      <SelectField label="Method" name="method" defaultValue={filters.method}>
        <option value="">Any method</option>
        {methods.map(({ id, title }) => (
          <option key={id} value={id}>
            {title}
          </option>
        ))}
      </SelectField>
      <TextField label="Words" type="search" name="q" maxLength={200} defaultValue={filters.text} placeholder="name, source, quantity" />
      {filters.failing && <input type="hidden" name="holds" value="no" />}
      <span className="flex h-row items-center gap-4">
        <Button type="submit" variant="ghost">
          Show
        </Button>
        {isNarrowed(filters) && (
          <Link href="/verification" className="link text-small">
            Clear
          </Link>
        )}
      </span>
    </Form>
  );
}
