'use client';

import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { QuotaPair } from '@/app/console/_components/quota-pair';
import { formatCount } from '@/app/_format/numbers';
import { DayChart } from './day-chart';
import { sums, type HistoryRow, type Sum } from './usage-view';

interface HistoryProps {
  readonly by: Sum;
  readonly rows: readonly HistoryRow[];
}

/** Days as a chart and the same numbers as a table; keys and calculations as a table with their share. */
export function History({ by, rows }: HistoryProps) {
  if (rows.every(({ calls }) => calls === 0)) return <p className="border-t border-rule pt-4 text-ash">No call in this time. Choose a longer range, or make a call and look again.</p>;
  const listed = by === 'day' ? rows.toReversed() : rows;
  const all = rows.reduce((sum, { units }) => sum + units, 0);
  return (
    <div className={by === 'day' ? 'grid gap-8 lg:grid-cols-[minmax(0,1fr)_18rem]' : ''}>
      {by === 'day' && <DayChart rows={rows} />}
      <TableFrame label={`Calls and units by ${sums[by].toLowerCase()}`} tall={by === 'day'}>
        <Table>
          <thead>
            <tr>
              <HeaderCell>{by === 'day' ? 'Day (UTC)' : sums[by]}</HeaderCell>
              <HeaderCell numeric>Calls</HeaderCell>
              <HeaderCell numeric>Units</HeaderCell>
              {by !== 'day' && (
                <HeaderCell className="hidden w-1/3 pl-6 sm:table-cell">
                  <span className="sr-only">Share of all units</span>
                </HeaderCell>
              )}
            </tr>
          </thead>
          <tbody>
            {listed.map(({ label, calls, units }) => (
              <Row key={label} className={calls === 0 ? 'text-ash' : ''}>
                <Cell mono={by === 'day'} className="max-w-0 min-w-28 truncate w-full sm:w-1/3" title={label}>
                  {label}
                </Cell>
                <Cell numeric>{formatCount(calls)}</Cell>
                <Cell numeric>{formatCount(units)}</Cell>
                {by !== 'day' && (
                  <Cell className="hidden pl-6 sm:table-cell">
                    <QuotaPair used={units} quota={all} plain />
                  </Cell>
                )}
              </Row>
            ))}
          </tbody>
        </Table>
      </TableFrame>
    </div>
  );
}
