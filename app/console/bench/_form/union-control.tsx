'use client';

import { useFormContext } from 'react-hook-form';
import { SelectField } from '@/app/_components/select-field';
import { useControl, type ControlProps } from './control';
import type { Field, UnionField } from './field';
import { FieldView } from './field-view';
import { startingValues } from './form-values';
import { GroupControl } from './group-control';
import { wordsOf } from './union-fields';

interface UnionControlProps extends ControlProps<UnionField> {
  /** Under a legend of its own the choice needs no further name, and what is chosen no indent. */
  readonly bare?: boolean;
}

/** A choice of kinds, and the fields of the chosen one beneath it. */
export function UnionControl({ bare = false, ...props }: UnionControlProps) {
  const { field, path, className = '' } = props;
  const { bound, error, label, help, description } = useControl({ ...props, label: props.label ?? (bare ? 'Kind' : undefined) });
  const { getValues, setValue } = useFormContext();
  const variant = field.variants.find(({ key }) => key === bound.value);
  const inner = variant?.field();

  function choose(key: string) {
    const chosen = field.variants.find((each) => each.key === key);
    const place = `${path}.options.${key}`;
    if (chosen && getValues(place) === undefined) setValue(place, startingValues(chosen.field()));
    bound.onChange(key);
  }

  return (
    <div className={className}>
      <SelectField {...bound} onChange={(event) => choose(event.target.value)} label={label} labelHidden={props.labelHidden} help={help} error={error} aria-description={description}>
        {(field.optional || !variant) && <option value="">{absent(field)}</option>}
        {field.variants.map(({ key, label: name }) => (
          <option key={key} value={key}>
            {name}
          </option>
        ))}
      </SelectField>
      {variant && inner && inner.kind !== 'constant' && (
        <div key={variant.key} className={bare ? 'mt-4' : 'mt-3 border-l border-rule pl-3.5'}>
          <Chosen field={inner} path={`${path}.options.${variant.key}`} title={field.title} />
        </div>
      )}
    </div>
  );
}

/** Of a group the choice has said the title; a single value is the thing itself. */
function Chosen({ field, path, title }: { readonly field: Field; readonly path: string; readonly title: string }) {
  if (field.kind === 'group') return <GroupControl field={{ ...field, optional: false }} path={path} bare />;
  return <FieldView field={field} path={path} label={field.kind === 'complex' ? field.title : title} />;
}

function absent({ optional, default: value }: UnionField): string {
  if (!optional) return 'Choose';
  if (value === undefined) return 'Not given';
  if (typeof value === 'object') return 'The default';
  return `${wordsOf(String(value))} (default)`;
}
