'use client';

import { CheckboxField } from '@/app/_components/checkbox-field';
import { SelectField } from '@/app/_components/select-field';
import { TextField } from '@/app/_components/text-field';
import { useControl, type ControlProps } from './control';
import type { BooleanField, ChoiceField, ChoicesField, TextField as Text } from './field';

export function ChoiceControl(props: ControlProps<ChoiceField>) {
  const { field, className, labelHidden } = props;
  const { bound, error, label, help, description } = useControl(props);
  const { default: fallback } = field;
  return (
    <SelectField {...bound} value={bound.value || (fallback ?? '')} label={label} labelHidden={labelHidden} help={help} error={error} className={className} aria-description={description}>
      {fallback === undefined && <option value="">{field.optional ? 'not given' : 'choose'}</option>}
      {field.options.map((option) => (
        <option key={option} value={option}>
          {option.replaceAll('_', ' ')}
        </option>
      ))}
    </SelectField>
  );
}

export function BooleanControl(props: ControlProps<BooleanField>) {
  const { field, className } = props;
  const { bound, error, help } = useControl(props);
  const { value, onChange, ...rest } = bound;
  return (
    <CheckboxField
      {...rest}
      checked={Boolean(value ?? field.default)}
      onChange={(event) => onChange(event.target.checked)}
      label={field.title}
      help={help}
      error={error}
      className={className}
      aria-description={field.description}
    />
  );
}

/** A box a word. Where none was ever touched the request leaves the list out, and the default stands. */
export function ChoicesControl(props: ControlProps<ChoicesField>) {
  const { field, className = '', labelHidden } = props;
  const { bound, error, help } = useControl(props);
  const chosen: readonly string[] = bound.value ?? (Array.isArray(field.default) ? field.default : []);

  function toggle(option: string) {
    bound.onChange(field.options.filter((each) => (each === option ? !chosen.includes(each) : chosen.includes(each))));
  }

  return (
    <div role="group" aria-label={field.title} className={className}>
      {!labelHidden && <p className="mb-[5px] text-small font-[550]">{field.title}</p>}
      <div className="flex flex-wrap gap-x-5 gap-y-1.5">
        {field.options.map((option, index) => (
          <CheckboxField
            key={option}
            ref={index === 0 ? bound.ref : undefined}
            name={`${bound.name}.${option}`}
            checked={chosen.includes(option)}
            onChange={() => toggle(option)}
            onBlur={bound.onBlur}
            label={option.replaceAll('_', ' ')}
          />
        ))}
      </div>
      {(error ?? help) && (
        <p className={`mt-1 text-fine ${error ? 'text-garnet' : 'text-ash'}`} role={error ? 'alert' : undefined}>
          {error ?? help}
        </p>
      )}
    </div>
  );
}

export function TextControl(props: ControlProps<Text>) {
  const { className, labelHidden } = props;
  const { bound, error, label, help, description } = useControl(props);
  return <TextField {...bound} value={bound.value ?? ''} label={label} labelHidden={labelHidden} help={help} error={error} className={className} aria-description={description} />;
}
