'use client';

import { useState } from 'react';
import { CodeBlock } from '@/app/_components/code-block';
import type { Cursor } from '../_plot/cursor';
import { Plots } from '../_plot/plots';
import { PartFigures } from './figures';
import { figuresOf } from './figures-of';
import { lengthOf } from './quantity-of-result';
import { RecordListView } from './record-list';
import type { ResultPart } from './result-view';
import { ResultTable } from './result-table';
import { exactAt, showAt } from './show-value';

/** Figures, then plots, then the rest of the single values, then tables. */
export function PartView({ part, nested = false }: { readonly part: ResultPart; readonly nested?: boolean }) {
  const count = Math.max(1, ...[...(part.axis ? [part.axis] : []), ...part.columns].map(lengthOf));
  const [index, setIndex] = useState(() => Math.floor(count / 2));
  const cursor: Cursor = { index: Math.min(index, count - 1), count, moveTo: setIndex };
  const Heading = nested ? 'h3' : 'h2';
  const figures = new Set(figuresOf(part));
  const rest = part.singles.filter((single) => !figures.has(single));
  return (
    <div className="min-w-0 space-y-7">
      <PartFigures part={part} index={cursor.index} />
      <Plots part={part} cursor={cursor} />
      {rest.length > 0 && <Singles quantities={rest} />}
      {part.lists.map((list) => (
        <RecordListView key={list.pointer} list={list} level={nested ? 'h3' : 'h2'} />
      ))}
      {(part.columns.length > 0 || part.axis) && <ResultTable part={part} cursor={cursor} />}
      {part.parts.map((inner) => (
        <section key={inner.pointer} className="min-w-0">
          <Heading className="mb-3 border-t border-rule pt-3 text-[14px] font-semibold">{inner.title}</Heading>
          <PartView part={inner} nested />
        </section>
      ))}
      {part.texts.map(({ title, pointer, text }) => (
        <section key={pointer} className="min-w-0">
          <Heading className="mb-1.5 text-small font-[550]">{title}</Heading>
          <CodeBlock code={text} label={title} tall />
        </section>
      ))}
      {!nested && part.absent.length > 0 && <p className="text-fine text-ash">Not part of this answer: {part.absent.join(', ')}.</p>}
    </div>
  );
}

function Singles({ quantities }: { readonly quantities: ResultPart['singles'] }) {
  return (
    <dl className="grid grid-cols-1 gap-x-9 text-[14px] sm:grid-cols-2">
      {quantities.map((quantity) => {
        const { value, unit } = showAt(quantity, 0, 5);
        return (
          <div key={quantity.pointer} className="flex min-h-8 items-baseline justify-between gap-4 border-b border-rule py-1" title={exactAt(quantity, 0)}>
            <dt className="text-ash">{quantity.title}</dt>
            <dd className={`font-mono text-[13px] ${quantity.kind === 'word' ? '' : 'whitespace-nowrap'}`}>
              {value} {unit}
            </dd>
          </div>
        );
      })}
    </dl>
  );
}
