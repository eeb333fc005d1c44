'use client';

import { createColumnHelper, flexRender, getCoreRowModel, getSortedRowModel, useReactTable, type SortingState } from '@tanstack/react-table';
import { useMemo, useState } from 'react';
import { LocalTime } from '@/app/_components/local-time';
import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { QuotaPair } from '@/app/console/_components/quota-pair';
import { formatCount, formatCountBriefly } from '@/app/_format/numbers';
import { scopesInWords, stateColours, type Key } from './key';

interface KeyTableProps {
  readonly keys: readonly Key[];
  readonly onOpen: (key: Key) => void;
}

const column = createColumnHelper<Key>();

/** How much of the table a screen has room for; the rest is in the key's sheet. */
const fromTablet = 'hidden md:table-cell';
const fromDesktop = 'hidden lg:table-cell';
const fromWideDesktop = 'hidden xl:table-cell';

export function KeyTable({ keys, onOpen }: KeyTableProps) {
  // The API's own order first: keys in force, then by name.
  const [sorting, setSorting] = useState<SortingState>([]);
  // The same columns from render to render: a cell is a component, and a new one would lose the focus that stands in it.
  const columns = useMemo(
    () => [
      column.accessor('name', {
        header: 'Name',
        cell: ({ row }) => (
          <button type="button" onClick={() => onOpen(row.original)} className="block w-full truncate text-left font-[550] underline decoration-rule underline-offset-3 hover:decoration-copper">
            {row.original.name}
          </button>
        ),
        meta: { className: 'w-full max-w-0 min-w-32 lg:min-w-48' },
      }),
      column.accessor('display', { header: 'Key', enableSorting: false, meta: { className: `whitespace-nowrap text-ash ${fromWideDesktop}`, mono: true } }),
      column.accessor(({ scopes }) => scopesInWords(scopes), {
        id: 'scopes',
        header: 'Scopes',
        enableSorting: false,
        cell: ({ row, getValue }) => (
          <span className="block max-w-48 truncate" title={row.original.scopes.join(', ')}>
            {getValue()}
          </span>
        ),
        meta: { className: fromDesktop },
      }),
      column.accessor('units_used', {
        header: 'Units used',
        cell: ({ row: { original: key } }) => (
          <span className="block" title={`${formatCount(key.units_used)} of ${formatCount(key.monthly_unit_quota)} units`}>
            <span>{formatCountBriefly(key.units_used)}</span>
            <span className="hidden text-ash sm:inline"> / {formatCountBriefly(key.monthly_unit_quota)}</span>
            <QuotaPair used={key.units_used} quota={key.monthly_unit_quota} className="mt-px mb-1 min-w-20" />
          </span>
        ),
        meta: { numeric: true },
      }),
      column.accessor('expires_at', {
        header: 'Expires',
        cell: ({ row }) => <Time iso={row.original.expires_at} show="date" />,
        meta: { className: `whitespace-nowrap ${fromTablet}`, mono: true },
      }),
      column.accessor('last_used_at', {
        header: 'Last used',
        cell: ({ row }) => <Time iso={row.original.last_used_at} show="moment" />,
        meta: { className: `whitespace-nowrap ${fromTablet}`, mono: true },
      }),
      column.accessor('state', {
        header: 'State',
        cell: ({ row: { original: key } }) => <span className={stateColours[key.state]}>{key.state}</span>,
      }),
    ],
    [onOpen],
  );
  const table = useReactTable({
    data: keys as Key[],
    columns,
    state: { sorting },
    onSortingChange: setSorting,
    getCoreRowModel: getCoreRowModel(),
    getSortedRowModel: getSortedRowModel(),
  });

  return (
    <TableFrame label="Keys">
      <Table>
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map(({ id, column: { columnDef, getCanSort, getIsSorted, getToggleSortingHandler }, getContext }) => {
                const direction = getIsSorted();
                const title = flexRender(columnDef.header, getContext());
                return (
                  <HeaderCell
                    key={id}
                    numeric={columnDef.meta?.numeric}
                    className={columnDef.meta?.className?.replace('max-w-0', '')}
                    aria-sort={direction ? (direction === 'asc' ? 'ascending' : 'descending') : undefined}
                  >
                    {getCanSort() ? (
                      <button type="button" onClick={getToggleSortingHandler()} className="hover:text-ink">
                        {title}
                        <span aria-hidden>{direction ? (direction === 'asc' ? ' ↑' : ' ↓') : ''}</span>
                      </button>
                    ) : (
                      title
                    )}
                  </HeaderCell>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody>
          {table.getRowModel().rows.map((row) => (
            <Row key={row.id} className={row.original.state === 'revoked' ? 'text-ash' : ''}>
              {row.getVisibleCells().map(({ id, column: { columnDef }, getContext }) => (
                <Cell key={id} numeric={columnDef.meta?.numeric} mono={columnDef.meta?.mono} className={columnDef.meta?.className}>
                  {flexRender(columnDef.cell, getContext())}
                </Cell>
              ))}
            </Row>
          ))}
        </tbody>
      </Table>
    </TableFrame>
  );
}

function Time({ iso, show }: { readonly iso: string | null; readonly show: 'date' | 'moment' }) {
  return iso ? <LocalTime iso={iso} show={show} /> : <span className="font-sans text-ash">never</span>;
}
