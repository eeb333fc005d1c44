'use client';

import { useMemo } from 'react';
import { flexRender, getCoreRowModel, getPaginationRowModel, useReactTable, type ColumnDef } from '@tanstack/react-table';
import '@/app/console/_components/column-meta';
import { Cell, HeaderCell, Row, Table, TableFrame } from '@/app/_components/table';
import { formatCount } from '@/app/_format/numbers';
import type { Cursor } from '../_plot/cursor';
import { csvOf, download, fileName } from '../_plot/save';
import { cellColumnsOf, type CellColumn } from './cells';
import type { ResultPart } from './result-view';
import { lengthOf } from './quantity-of-result';

const pageSize = 50;

/** Every column of a part; a row chosen moves the cursor there. */
export function ResultTable({ part, cursor }: { readonly part: ResultPart; readonly cursor: Cursor }) {
  const { axis, columns, title } = part;
  const quantities = useMemo(() => [...(axis ? [axis] : []), ...columns], [axis, columns]);
  const length = Math.max(0, ...quantities.map(lengthOf));
  const rows = useMemo(() => Array.from({ length }, (_, index) => index), [length]);
  const definitions = useMemo(() => cellColumnsOf(quantities).map(definitionOf), [quantities]);
  // The table's own functions change with its state; nothing here keeps one across renders.
  // eslint-disable-next-line react-hooks/incompatible-library
  const table = useReactTable({
    data: rows,
    columns: definitions,
    getCoreRowModel: getCoreRowModel(),
    getPaginationRowModel: getPaginationRowModel(),
    initialState: { pagination: { pageIndex: Math.floor(cursor.index / pageSize), pageSize } },
    autoResetPageIndex: false,
  });
  if (length === 0) return null;
  return (
    <div>
      <TableFrame label={title === 'Result' ? 'Table of the result' : title} tall={length > 10} className="[&]:lg:overflow-auto">
        <Table>
          <thead>
            <tr>
              {table.getFlatHeaders().map(({ id, column, getContext }) => (
                <HeaderCell key={id} numeric={column.columnDef.meta?.numeric}>
                  {flexRender(column.columnDef.header, getContext())}
                </HeaderCell>
              ))}
            </tr>
          </thead>
          <tbody>
            {table.getRowModel().rows.map((row) => (
              <Row key={row.id} onClick={() => cursor.moveTo(row.original)} className={row.original === cursor.index && length > 1 ? '[&>td]:bg-wash' : ''}>
                {row.getVisibleCells().map((cell) => (
                  <Cell key={cell.id} numeric={cell.column.columnDef.meta?.numeric}>
                    {flexRender(cell.column.columnDef.cell, cell.getContext())}
                  </Cell>
                ))}
              </Row>
            ))}
          </tbody>
        </Table>
      </TableFrame>
      <div className="mt-2 flex flex-wrap items-baseline gap-x-4 text-fine text-ash">
        <span>
          {formatCount(length)} {length === 1 ? 'row' : 'rows'}
          {table.getPageCount() > 1 && `, page ${formatCount(table.getState().pagination.pageIndex + 1)} of ${formatCount(table.getPageCount())}`}
        </span>
        {table.getPageCount() > 1 && (
          <>
            <Turn disabled={!table.getCanPreviousPage()} onClick={() => table.previousPage()}>
              Earlier rows
            </Turn>
            <Turn disabled={!table.getCanNextPage()} onClick={() => table.nextPage()}>
              Later rows
            </Turn>
          </>
        )}
        <span className="ml-auto">
          <Turn disabled={false} onClick={() => download(fileName(title, 'csv'), 'text/csv', csvOf(quantities))}>
            Download as CSV
          </Turn>
        </span>
      </div>
    </div>
  );
}

function definitionOf({ id, title, unit, numeric, cell }: CellColumn): ColumnDef<number> {
  const header = () => (
    <>
      {title}
      {unit && <span className="ml-1.5 font-mono font-normal">{unit}</span>}
    </>
  );
  return { id, header, meta: { numeric }, cell: ({ row }) => cell(row.original) };
}

function Turn({ disabled, onClick, children }: { readonly disabled: boolean; readonly onClick: () => void; readonly children: string }) {
  return (
    <button type="button" disabled={disabled} onClick={onClick} className="underline decoration-rule underline-offset-3 enabled:hover:text-ink disabled:no-underline disabled:opacity-50">
      {children}
    </button>
  );
}
