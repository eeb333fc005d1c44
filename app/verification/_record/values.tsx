import type { ReactNode } from 'react';
import type { Check, Comparison } from '@/lib/verification/checks';
import { brief, computedLines, publishedLines, type Line } from './digits';

/** As many values as a check shows before a reader asks for more. */
const shownAtOnce = 3;

/** What the engine owes an explanation for comes first; what fails is never folded away. */
function arrange(comparisons: readonly Comparison[]): readonly [shown: readonly Comparison[], folded: readonly Comparison[]] {
  const failing = comparisons.filter(({ holds }) => !holds);
  const holding = comparisons.filter(({ holds }) => holds);
  const room = Math.max(0, shownAtOnce - failing.length);
  // To fold one value away would cost the line that it saves.
  const fits = holding.length <= room + 1;
  return [[...failing, ...(fits ? holding : holding.slice(0, room))], fits ? [] : holding.slice(room)];
}

export function Values({ check, comparisons, refused }: { readonly check: Check; readonly comparisons: readonly Comparison[]; readonly refused: boolean }) {
  const [shown, folded] = arrange(comparisons);
  return (
    <>
      <ValueTable check={check} comparisons={shown} refused={refused} />
      {folded.length > 0 && (
        <details className="folded">
          <summary>
            {folded.length} more values<span className="sr-only"> of {check.name}</span>
          </summary>
          <ValueTable check={check} comparisons={folded} refused={refused} />
        </details>
      )}
    </>
  );
}

interface ValueTableProps {
  readonly check: Check;
  readonly comparisons: readonly Comparison[];
  readonly refused: boolean;
}

function ValueTable({ check, comparisons, refused }: ValueTableProps) {
  return (
    <table className="values" aria-label={check.name}>
      <thead>
        <tr>
          {columns.map((title) => (
            <th key={title} scope="col">
              {title}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {comparisons.map((comparison) => (
          <ValueRow key={comparison.pointer} comparison={comparison} limit={limits[check.comparison ?? 'equal']} refused={refused} />
        ))}
      </tbody>
    </table>
  );
}

export const columns = ['Quantity', 'Published', 'Computed now', 'Difference', 'Allowed'] as const;

const limits = { equal: '', at_most: 'at most ', at_least: 'at least ' } as const;

interface ValueRowProps {
  readonly comparison: Comparison;
  readonly limit: string;
  readonly refused: boolean;
}

function ValueRow({ comparison, limit, refused }: ValueRowProps) {
  const { pointer, published, computed, difference, tolerance, holds, reason } = comparison;
  return (
    <tr className={holds ? undefined : 'fails'}>
      <th scope="row">
        {pointer.slice(1)}
        {reason && <small>{reason}</small>}
      </th>
      <td>
        {limit && <i>{limit}</i>}
        {lines(publishedLines(published))}
      </td>
      <td>{refused ? <i>no answer</i> : lines(computedLines(published, computed))}</td>
      <td>
        {difference !== null ? brief(difference) : holds ? 'the same' : !refused && <b>not the same</b>}
        {difference !== null && !holds && <b> does not hold</b>}
      </td>
      <td>{brief(tolerance)}</td>
    </tr>
  );
}

/** Plain text wherever it can be: a page has thousands of these. */
function lines(of: readonly Line[]): ReactNode[] {
  return of.flatMap(({ before, agreeing, following, after }, index) => [(index > 0 ? '\n' : '') + before + agreeing, following && <span key={index}>{following}</span>, after]);
}
