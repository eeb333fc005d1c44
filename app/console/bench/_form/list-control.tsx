'use client';

import { useFieldArray, useFormContext } from 'react-hook-form';
import { useControl, type ControlProps } from './control';
import type { Field, ListField } from './field';
import { FieldView } from './field-view';
import { startingValues } from './form-values';
import { UnionControl } from './union-control';

/** Entries in order, between two conductors that run down the side as the chain itself does. */
export function ListControl(props: ControlProps<ListField>) {
  const { field, path, className = '' } = props;
  const { bound, error, help } = useControl(props);
  const { ref, name } = bound;
  const { setValue } = useFormContext();
  const { fields: entries, append, remove, move } = useFieldArray({ name: `${path}.items` });
  const item = field.item();
  const fixed = field.least === field.most;

  function add() {
    setValue(name, true);
    append({ value: startingValues(item) }, { shouldFocus: false });
  }

  return (
    <div role="group" aria-label={field.title} className={className}>
      <ol className="space-y-5 border-l border-rule pl-[3px]">
        {entries.map(({ id }, index) => (
          <li key={id} className="border-l border-rule pl-3.5">
            <div className="mb-1.5 flex items-baseline gap-3 text-fine text-ash">
              <span className="font-mono">{index + 1}</span>
              {!fixed && (
                <span className="ml-auto flex gap-1">
                  <Step label={`Move entry ${index + 1} up`} sign="↑" disabled={index === 0} onClick={() => move(index, index - 1)} />
                  <Step label={`Move entry ${index + 1} down`} sign="↓" disabled={index === entries.length - 1} onClick={() => move(index, index + 1)} />
                  <Step label={`Remove entry ${index + 1}`} sign="×" disabled={entries.length <= field.least} onClick={() => remove(index)} />
                </span>
              )}
            </div>
            <Entry field={item} path={`${path}.items.${index}.value`} title={`${field.title} ${index + 1}`} />
          </li>
        ))}
      </ol>
      {!fixed && entries.length < field.most && (
        <button type="button" ref={ref} onClick={add} className="mt-3 rounded-field border border-edge px-3 py-1 text-small hover:bg-wash">
          Add
        </button>
      )}
      {(error ?? help) && (
        <p className={`mt-1 text-fine ${error ? 'text-garnet' : 'text-ash'}`} role={error ? 'alert' : undefined}>
          {error ?? help}
        </p>
      )}
    </div>
  );
}

/** Its number has named it; what remains to say of a union is which kind. */
function Entry({ field, path, title }: { readonly field: Field; readonly path: string; readonly title: string }) {
  if (field.kind === 'union') return <UnionControl field={field} path={path} label={`Kind of ${title.toLowerCase()}`} labelHidden bare />;
  return <FieldView field={field} path={path} label={title} labelHidden={field.kind !== 'group'} />;
}

function Step({ label, sign, disabled, onClick }: { readonly label: string; readonly sign: string; readonly disabled: boolean; readonly onClick: () => void }) {
  return (
    <button type="button" aria-label={label} title={label} disabled={disabled} onClick={onClick} className="size-6 rounded-field font-mono text-small text-ash enabled:hover:bg-wash enabled:hover:text-ink disabled:opacity-35">
      {sign}
    </button>
  );
}
