'use client';

import Link from 'next/link';
import { LocalTime } from '@/app/_components/local-time';
import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { formatCount, formatMilliseconds } from '@/app/_format/numbers';
import { callerOf, statusColour, type Call } from './call';

/** The name of the calculation is the link, stretched over its row. */
export function CallTable({ calls }: { readonly calls: readonly Call[] }) {
  return (
    <TableFrame label="Calls">
      <Table>
        <thead>
          <tr>
            <HeaderCell>Time</HeaderCell>
            <HeaderCell className="hidden sm:table-cell">Caller</HeaderCell>
            <HeaderCell>Calculation</HeaderCell>
            <HeaderCell numeric>Status</HeaderCell>
            <HeaderCell numeric>Units</HeaderCell>
            <HeaderCell numeric className="hidden md:table-cell">
              ms
            </HeaderCell>
            <HeaderCell className="hidden pl-6 lg:table-cell">Call</HeaderCell>
          </tr>
        </thead>
        <tbody>
          {calls.map((call) => (
            <Row key={call.id} className="relative">
              <Cell mono className="whitespace-nowrap">
                <span className="hidden sm:inline">
                  <LocalTime iso={call.created_at} />
                </span>
                <span className="sm:hidden">
                  <LocalTime iso={call.created_at} show="clock" />
                </span>
              </Cell>
              <Cell className="hidden max-w-0 min-w-32 truncate sm:table-cell sm:w-1/3" title={callerOf(call)}>
                {callerOf(call)}
              </Cell>
              <Cell className="w-1/2 max-w-0 min-w-28 sm:w-1/3">
                <Link href={`/console/calls/${call.id}`} className="block truncate -outline-offset-2 after:absolute after:inset-0" title={call.calculation}>
                  {call.calculation}
                </Link>
              </Cell>
              <Cell numeric className={statusColour(call.status)} title={call.problem ?? undefined}>
                {call.status}
              </Cell>
              <Cell numeric>{formatCount(call.units)}</Cell>
              <Cell numeric className="hidden md:table-cell">
                {formatMilliseconds(call.duration_ms)}
              </Cell>
              <Cell mono className="hidden pl-6 whitespace-nowrap text-ash lg:table-cell">
                {call.id}
              </Cell>
            </Row>
          ))}
        </tbody>
      </Table>
    </TableFrame>
  );
}
