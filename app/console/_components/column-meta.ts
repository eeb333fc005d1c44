/** What a table's columns say about themselves to their cells. */
import type { RowData } from '@tanstack/react-table';

declare module '@tanstack/react-table' {
  // The parameters must be those of the library's own declaration.
  // eslint-disable-next-line @typescript-eslint/no-unused-vars
  interface ColumnMeta<TData extends RowData, TValue> {
    readonly numeric?: boolean;
    readonly mono?: boolean;
    readonly className?: string;
  }
}
