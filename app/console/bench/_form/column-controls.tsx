'use client';

import { useFormContext } from 'react-hook-form';
import { TextAreaField } from '@/app/_components/text-area-field';
import { useControl, type ControlProps } from './control';
import type { ComplexesField, JsonField, NumbersField, RowsField } from './field';
import type { RowsValue } from './form-values';

const longest = 10;

function heightOf(text: string): number {
  return Math.min(longest, Math.max(2, text.split('\n').length));
}

/** Several numbers, in lines or between commas. */
export function NumbersControl(props: ControlProps<NumbersField | ComplexesField>) {
  const { path, className, field } = props;
  const { bound, error, label, help, description } = useControl(props);
  const { getValues } = useFormContext();
  const unit = String(getValues(`${path}.unit`) ?? field.unit);
  const text = String(bound.value ?? '');
  const form = field.kind === 'complexes' ? 'Complex numbers such as 75-30j' : 'Numbers';
  const note = `${form}, one a line or between commas${unit ? `; ${unit} where no unit is typed` : ''}.`;
  return <TextAreaField {...bound} value={text} label={label} help={help ? `${help} ${note}` : note} error={error} className={className} rows={heightOf(text)} mono spellCheck={false} autoComplete="off" aria-description={description} />;
}

/** Lines of columns, as they are pasted from a spreadsheet. */
export function RowsControl(props: ControlProps<RowsField>) {
  const { path, className, field } = props;
  const { bound, error, label, help, description } = useControl(props);
  const { getValues } = useFormContext();
  const { units }: RowsValue = getValues(path);
  const text = String(bound.value ?? '');
  const columns = field.columns.map((column, index) => `${column.field.title.toLowerCase()}${units[index] ? ` in ${units[index]}` : ''}`).join(', then ');
  return (
    <TextAreaField
      {...bound}
      value={text}
      label={label}
      help={`${help ? `${help} ` : ''}A line each: ${columns}. Lines pasted from a spreadsheet will do.`}
      error={error}
      className={className}
      rows={heightOf(text) + 1}
      mono
      spellCheck={false}
      autoComplete="off"
      aria-description={description}
    />
  );
}

export function JsonControl(props: ControlProps<JsonField>) {
  const { className } = props;
  const { bound, error, label, help, description } = useControl(props);
  return <TextAreaField {...bound} value={bound.value ?? ''} label={label} help={help ?? 'JSON.'} error={error} className={className} mono spellCheck={false} aria-description={description} />;
}
