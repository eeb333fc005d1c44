'use client';

import type { ReactNode } from 'react';
import { SelectField } from '@/app/_components/select-field';
import type { Calculation } from '@/lib/solvers/calculation';

/** Where the form's values began: the number of an example, or a link. */
export type Origin = number | 'link' | 'unreadable link';

interface ExampleSelectProps {
  readonly calculation: Calculation;
  readonly origin: Origin;
  readonly onChoose: (index: number) => void;
  readonly explainSwitch: ReactNode;
}

export function ExampleSelect({ calculation, origin, onChoose, explainSwitch }: ExampleSelectProps) {
  const source = typeof origin === 'number' ? calculation.examples[origin].source : undefined;
  const error = origin === 'unreadable link' ? 'The input in the link cannot be read; this is the first example.' : undefined;
  return (
    <div className="relative">
      <SelectField
        label="Start from"
        value={String(origin === 'unreadable link' ? 0 : origin)}
        onChange={(event) => onChoose(Number(event.target.value))}
        help={source ? `Source: ${source}` : undefined}
        error={error}
      >
        {origin === 'link' && <option value="link">The input in the link</option>}
        {calculation.examples.map(({ name }, index) => (
          <option key={name} value={index}>
            {name}
          </option>
        ))}
      </SelectField>
      <span className="absolute top-0 right-0">{explainSwitch}</span>
    </div>
  );
}
