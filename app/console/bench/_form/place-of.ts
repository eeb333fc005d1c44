/** Where in the form a complaint about the input stands: from an RFC 6901 pointer to the path of a control. */
import type { Field } from './field';
import type { FormValue, GroupValue, ListValue, UnionValue } from './form-values';

export interface Place {
  /** The control that shows the complaint and takes the focus. */
  readonly path: string;
  readonly field: Field;
}

export function stepsOf(pointer: string): string[] {
  return pointer.split('/').slice(1).map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));
}

/** The control at the pointer, or the nearest one around it where the pointer leads deeper than the form. */
export function placeOf(root: Field, values: FormValue, pointer: string): Place {
  return find(root, values, stepsOf(pointer), 'input');
}

function find(field: Field, value: FormValue, [step, ...rest]: string[], path: string): Place {
  if (field.kind === 'group') {
    const member = field.members.find(({ name }) => name === step);
    if (member) return find(member.field, (value as GroupValue).members[member.name], rest, `${path}.members.${member.name}`);
  }
  if (field.kind === 'list' && step !== undefined) {
    const item = (value as ListValue).items[Number(step)];
    if (item) return find(field.item(), item.value, rest, `${path}.items.${step}.value`);
  }
  if (field.kind === 'union') {
    const { variant: key, options } = value as UnionValue;
    const inner = field.variants.find((variant) => variant.key === key)?.field();
    if (inner && inner.kind !== 'constant' && (step !== undefined || inner.kind !== 'group')) {
      return find(inner, options[key], step === undefined ? [] : [step, ...rest], `${path}.options.${key}`);
    }
  }
  return { path: slotOf(field, path), field };
}

/** The part of a field's value that its control is registered under. */
export function slotOf(field: Field, path: string): string {
  switch (field.kind) {
    case 'number':
    case 'complex':
    case 'numbers':
    case 'complexes':
    case 'rows':
      return `${path}.text`;
    case 'group':
    case 'list':
      return `${path}.present`;
    case 'union':
      return `${path}.variant`;
    default:
      return path;
  }
}
