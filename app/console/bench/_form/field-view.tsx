'use client';

import { BooleanControl, ChoiceControl, ChoicesControl, TextControl } from './choice-controls';
import { JsonControl, NumbersControl, RowsControl } from './column-controls';
import type { ControlProps } from './control';
import { GroupControl } from './group-control';
import { ListControl } from './list-control';
import { QuantityControl } from './quantity-control';
import { UnionControl } from './union-control';

/** The control for a field, whatever it is. */
export function FieldView({ field, ...rest }: ControlProps) {
  switch (field.kind) {
    case 'number':
    case 'complex':
      return <QuantityControl field={field} {...rest} />;
    case 'choice':
      return <ChoiceControl field={field} {...rest} />;
    case 'boolean':
      return <BooleanControl field={field} {...rest} />;
    case 'choices':
      return <ChoicesControl field={field} {...rest} />;
    case 'text':
      return <TextControl field={field} {...rest} />;
    case 'numbers':
    case 'complexes':
      return <NumbersControl field={field} {...rest} />;
    case 'rows':
      return <RowsControl field={field} {...rest} />;
    case 'json':
      return <JsonControl field={field} {...rest} />;
    case 'group':
      return <GroupControl field={field} {...rest} />;
    case 'union':
      return <UnionControl field={field} {...rest} />;
    case 'list':
      return <ListControl field={field} {...rest} />;
    case 'constant':
      return null;
  }
}
