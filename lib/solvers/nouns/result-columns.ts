/** From columns of numbers to those of an answer: null where there is no finite value, with a warning that says where. */
import type { Warning } from '../calculation';
import type { ComplexColumnResult, RealColumn } from './columns';

export interface Gap {
  readonly pointer: string;
  readonly code: string;
  /** "the input current vanishes": why there is no value. */
  readonly reason: string;
}

/** More indexes than these would not be read; the nulls themselves show the rest. */
const mostIndexes = 20;

export class ResultColumns {
  private readonly gathered: Warning[] = [];

  get warnings(): readonly Warning[] {
    return this.gathered;
  }

  /** -0 is written as 0, as JSON has it. */
  real(values: Float64Array, gap: Gap, isGap: (index: number) => boolean = () => false): RealColumn {
    const gaps: number[] = [];
    const column = Array.from(values, (value, index) => {
      if (Number.isFinite(value) && !isGap(index)) return value + 0;
      gaps.push(index);
      return null;
    });
    this.note(gap, gaps);
    return column;
  }

  complex({ re, im }: { re: Float64Array; im: Float64Array }, gap: Gap, isGap: (index: number) => boolean = () => false): ComplexColumnResult {
    const gaps: number[] = [];
    const column: { re: RealColumn; im: RealColumn } = { re: [], im: [] };
    for (let index = 0; index < re.length; index++) {
      const exists = Number.isFinite(re[index]) && Number.isFinite(im[index]) && !isGap(index);
      if (!exists) gaps.push(index);
      column.re.push(exists ? re[index] + 0 : null);
      column.im.push(exists ? im[index] + 0 : null);
    }
    this.note(gap, gaps);
    return column;
  }

  private note({ pointer, code, reason }: Gap, gaps: readonly number[]): void {
    if (gaps.length === 0) return;
    const shown = gaps.slice(0, mostIndexes).join(', ');
    const more = gaps.length > mostIndexes ? ` and ${gaps.length - mostIndexes} more` : '';
    this.gathered.push({ code, pointer, detail: `${reason}; null at index ${shown}${more}` });
  }
}

/** For quantities that always have a value. */
export function finiteColumn(values: Float64Array): number[] {
  return Array.from(values, (value) => value + 0);
}
