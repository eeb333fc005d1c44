'use client';

import Link from 'next/link';
import { useMemo } from 'react';
import { formatCount } from '@/app/_format/numbers';
import type { Calculation } from '@/lib/solvers/calculation';
import { readerOf } from '../_form/json-schema';
import type { Answer } from './answer';
import { Methods } from './methods';
import { PartView } from './part-view';
import { resultView } from './result-view';
import { Warnings } from './warnings';

interface AnswerViewProps {
  readonly calculation: Calculation;
  readonly answer: Answer;
}

export function AnswerView({ calculation, answer }: AnswerViewProps) {
  const part = useMemo(() => resultView(readerOf(calculation.output, 'output'), answer.result), [calculation, answer]);
  const { id, engine, usage, methods, warnings } = answer;
  return (
    <div className="min-w-0 space-y-7">
      <PartView key={id} part={part} />
      <Warnings warnings={warnings} />
      <Methods methods={methods} />
      <p className="flex flex-wrap gap-x-4 text-fine text-ash">
        <Link href={`/console/calls/${id}`} className="font-mono underline decoration-rule underline-offset-3 hover:text-ink">
          {id}
        </Link>
        <span>engine {engine}</span>
        <span>
          {formatCount(usage.units)} {usage.units === 1 ? 'unit' : 'units'}, {formatCount(usage.remaining)} left this month
        </span>
      </p>
    </div>
  );
}
