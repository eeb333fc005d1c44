'use client';

import { useFormContext } from 'react-hook-form';
import { TextField } from '@/app/_components/text-field';
import { engineeringComplex, formatQuantity } from '@/app/_format/numbers';
import { readComplex } from '@/lib/quantities/read-complex';
import { readQuantity, tidy } from '@/lib/quantities/read-quantity';
import { shownUnit, writeComplex } from '@/lib/quantities/write-quantity';
import { useControl, type ControlProps } from './control';
import type { ComplexField, NumberField } from './field';

type QuantityField = NumberField | ComplexField;

/** A number with its unit, or a complex number, as text. A unit that is typed takes the place of the one shown. */
export function QuantityControl(props: ControlProps<QuantityField>) {
  const { field, path, labelHidden, className } = props;
  const { bound, error, label, help, description } = useControl(props);
  const { getValues } = useFormContext();
  const shown = String(getValues(`${path}.unit`) ?? field.unit);
  const text = String(bound.value ?? '');
  const hasUnit = carriesUnit(text);
  return (
    <TextField
      {...bound}
      value={text}
      label={label}
      labelHidden={labelHidden}
      className={className}
      help={(hasUnit && inFieldUnit(field, text)) || help}
      error={error}
      unit={hasUnit ? undefined : spaced(shown)}
      mono
      autoComplete="off"
      spellCheck={false}
      placeholder={placeholderOf(field, shown)}
      aria-description={description}
    />
  );
}

/** "30.5 pF/ft" rather than "30.5": letters beyond an exponent, j, or the angle of a polar form. */
function carriesUnit(text: string): boolean {
  const rest = tidy(text).replace(/∠.*?(°|deg|rad)/, '').replace(/\d(e[+-]?\d+)?/gi, '').replace(/[ji](?![a-z])/gi, '');
  return /[a-zµμ°Ω%"']/i.test(rest);
}

/** What was typed in another unit, in the field's own. */
function inFieldUnit(field: QuantityField, text: string): string | undefined {
  try {
    if (field.kind === 'number') return formatQuantity(readQuantity(text, field.unit), field.unit, 5);
    const value = readComplex(text, field.unit);
    if (typeof value === 'number') return formatQuantity(value, field.unit, 5);
    if ('magnitude' in value) return `${formatQuantity(value.magnitude, field.unit, 5)} ∠ ${value.angle_deg}°`;
    const { value: parts, unit } = engineeringComplex(value, field.unit, 5);
    return `${parts} ${unit}`;
  } catch {
    return undefined;
  }
}

function placeholderOf(field: QuantityField, shown: string): string | undefined {
  const { default: value, unit } = field;
  if (typeof value !== 'number' && !(typeof value === 'object' && value !== null)) return undefined;
  return writeComplex(value as number, unit, typeof value === 'number' && shownUnit(value, unit) !== shown ? unit : shown);
}

function spaced(unit: string): string | undefined {
  return unit === '' ? undefined : unit.replaceAll('*', '·').replace('degC', '°C').replace(/^deg$/, '°');
}
