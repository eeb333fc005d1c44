import Link from 'next/link';
import { sentence } from '@/app/_format/sentence';
import type { MethodUse } from './answer';

/** What the numbers rest on, and whether this input lies where the method was shown to hold. */
export function Methods({ methods }: { readonly methods: readonly MethodUse[] }) {
  if (methods.length === 0) return null;
  return (
    <section aria-label="Methods" className="border-t border-rule">
      <ul>
        {methods.map(({ id, title, source, range, accuracy, in_range: inRange }) => (
          <li key={id} className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-5 gap-y-0.5 border-b border-rule py-3 text-small last:border-b-0">
            <Link href={`/methods/${id}`} prefetch={false} className="w-fit hover:text-copper underline decoration-rule underline-offset-3 hover:decoration-copper">
              {title}
            </Link>
            <span className={`text-right ${inRange ? 'text-ash' : 'font-[550] text-ochre'}`}>{inRange ? 'in range' : 'out of range'}</span>
            <span className="col-span-2 text-ash">{[source, range, accuracy].map((clause) => sentence(clause)).join(' ')}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
