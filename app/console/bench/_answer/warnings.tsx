import { Notice } from '@/app/_components/notice';
import type { AnswerWarning } from './answer';

/** A pole at every index of a sweep is one thing to know, not two thousand. */
const mostShown = 6;

export function Warnings({ warnings }: { readonly warnings: readonly AnswerWarning[] }) {
  if (warnings.length === 0) return null;
  const more = warnings.length - mostShown;
  return (
    <div className="space-y-3">
      {warnings.slice(0, mostShown).map(({ code, pointer, detail }) => (
        <Notice key={`${code} ${pointer} ${detail}`} title={`${words(code)}.`}>
          {detail.charAt(0).toUpperCase() + detail.slice(1)} <span className="font-mono text-fine text-ash">{pointer}</span>
        </Notice>
      ))}
      {more > 0 && <p className="text-fine text-ash">And {more} more of the like; the answer of the API lists them.</p>}
    </div>
  );
}

function words(code: string): string {
  const text = code.replaceAll(/[_-]/g, ' ');
  return text.charAt(0).toUpperCase() + text.slice(1);
}
