import { formatCount } from '@/app/_format/numbers';
import type { Standing } from '@/lib/verification/standing';
import { percent } from './digits';

/** "61 checks, 244 values: all hold; at most 9 % of what is allowed". */
export function StandingWords({ standing }: { readonly standing: Standing }) {
  const { checks, values, worst } = standing;
  return (
    <>
      {counted(checks, 'check')}, {counted(values, 'value')}: <Verdict standing={standing} />
      {worst && Number.isFinite(worst.share) && `; at most ${percent(worst.share)} of what is allowed`}
    </>
  );
}

export function Verdict({ standing: { values, failingValues } }: { readonly standing: Standing }) {
  if (failingValues === 0) return <span className="font-[550] text-patina">{values === 1 ? 'holds' : 'all hold'}</span>;
  return (
    <span className="font-[550] text-garnet">
      {formatCount(failingValues)} {failingValues === 1 ? 'does' : 'do'} not hold
    </span>
  );
}

export function counted(count: number, noun: string): string {
  return `${formatCount(count)} ${noun}${count === 1 ? '' : 's'}`;
}
