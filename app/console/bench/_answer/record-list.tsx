'use client';

import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { figuresOf } from './figures-of';
import { PartView } from './part-view';
import type { RecordList, ResultPart } from './result-view';
import { exactAt, showAt } from './show-value';

/** Records that hold single values are a table; records that hold more open one by one. */
export function RecordListView({ list, level: Heading }: { readonly list: RecordList; readonly level: 'h2' | 'h3' }) {
  const flat = list.records.every((record) => record.columns.length + record.lists.length + record.parts.length + record.texts.length === 0);
  return (
    <section className="min-w-0">
      <Heading className="mb-1 text-small font-[550]">{list.title}</Heading>
      {flat ? <RecordTable list={list} /> : list.records.map((record, index) => <RecordEntry key={record.pointer} record={record} open={index === 0} index={index} />)}
    </section>
  );
}

function RecordTable({ list: { title, records } }: { readonly list: RecordList }) {
  const columns = [...new Map(records.flatMap(({ singles }) => singles.map((single) => [single.name + single.title, single] as const))).entries()];
  return (
    <TableFrame label={title} tall={records.length > 12}>
      <Table>
        <thead>
          <tr>
            <HeaderCell numeric className="w-8">
              <span className="sr-only">Number</span>
            </HeaderCell>
            {columns.map(([key, column]) => (
              <HeaderCell key={key} numeric={column.kind !== 'word'}>
                {column.title}
              </HeaderCell>
            ))}
          </tr>
        </thead>
        <tbody>
          {records.map(({ pointer, singles }, index) => (
            <Row key={pointer}>
              <Cell numeric className="text-ash">
                {index + 1}
              </Cell>
              {columns.map(([key, column]) => {
                const single = singles.find((each) => each.name + each.title === key);
                const shown = single ? showAt(single, 0, 5) : { value: '', unit: '' };
                return (
                  <Cell key={key} numeric={column.kind !== 'word'} title={single ? exactAt(single, 0) : undefined}>
                    {shown.value} {shown.unit}
                  </Cell>
                );
              })}
            </Row>
          ))}
        </tbody>
      </Table>
    </TableFrame>
  );
}

function RecordEntry({ record, open, index }: { readonly record: ResultPart; readonly open: boolean; readonly index: number }) {
  const summary = figuresOf(record).slice(0, 3);
  return (
    <details open={open} className="group border-b border-rule">
      <summary className="flex min-h-row flex-wrap items-center gap-x-5 py-1.5 text-[14px] hover:bg-wash">
        <span className="w-5 font-mono text-fine text-ash">{index + 1}</span>
        {summary.map((quantity) => {
          const { value, unit } = showAt(quantity, 0);
          return (
            <span key={quantity.pointer} className={quantity.kind === 'word' ? 'font-[550]' : 'font-mono text-[13px]'}>
              {value} <span className="text-fine text-ash">{unit}</span>
            </span>
          );
        })}
        <svg viewBox="0 0 12 8" aria-hidden className="ml-auto w-[11px] text-ash group-open:rotate-180">
          <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.5" />
        </svg>
      </summary>
      <div className="pt-2 pb-6 sm:pl-10">
        <PartView part={record} nested />
      </div>
    </details>
  );
}
