import type { Calculation } from '@/lib/solvers/calculation';

/** The place of the answer before there is one: what will stand here and what it rests on. */
export function BeforeFirstRun({ calculation }: { readonly calculation: Calculation }) {
  return (
    <div className="max-w-measure">
      <h2 className="text-heading font-semibold">Nothing calculated yet</h2>
      <p className="mt-1 text-ash">
        The form holds a worked example. Press Calculate, or change it first: any field takes a unit of your own, such as 12 ft, 30.8 pF/ft or 24 AWG.
      </p>
      <p className="mt-5 mb-1 text-small font-[550]">It may rest on</p>
      <ul className="border-t border-rule">
        {calculation.methods.map(({ id, title, source }) => (
          <li key={id} className="border-b border-rule py-2 text-small">
            {title} <span className="block text-ash">{source}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}
