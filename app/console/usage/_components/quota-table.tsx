'use client';

import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { QuotaPair } from '@/app/console/_components/quota-pair';
import { formatCount } from '@/app/_format/numbers';
import type { UsageData } from './usage-view';

interface QuotaTableProps {
  readonly organization: UsageData['organization'];
  readonly keys: UsageData['keys'];
}

export function QuotaTable({ organization, keys }: QuotaTableProps) {
  const rows = [{ id: 'organization', name: 'Organization, all callers', ...organization }, ...keys];
  return (
    <TableFrame label="Units used against quota" tall={keys.length > 10}>
      <Table>
        <thead>
          <tr>
            <HeaderCell>Caller</HeaderCell>
            <HeaderCell numeric>Units used</HeaderCell>
            <HeaderCell numeric>Quota</HeaderCell>
            <HeaderCell numeric>Share</HeaderCell>
            <HeaderCell className="hidden w-1/3 pl-6 sm:table-cell">
              <span className="sr-only">Share drawn</span>
            </HeaderCell>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ id, name, units_used: used, monthly_unit_quota: quota }) => (
            <Row key={id} className={id === 'organization' ? 'font-[550]' : ''}>
              <Cell className="w-full max-w-0 min-w-28 truncate sm:w-1/3" title={name}>
                {name}
              </Cell>
              <Cell numeric>{formatCount(used)}</Cell>
              <Cell numeric className="text-ash">
                {formatCount(quota)}
              </Cell>
              <Cell numeric>{quota === 0 ? '–' : `${(Math.floor((1000 * used) / quota) / 10).toFixed(1)} %`}</Cell>
              <Cell className="hidden pl-6 sm:table-cell">
                <QuotaPair used={used} quota={quota} />
              </Cell>
            </Row>
          ))}
        </tbody>
      </Table>
    </TableFrame>
  );
}
