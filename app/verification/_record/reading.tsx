const parts = [
  ['References', 'Exact physics is held against 30 digits, found by another route than the engine’s: matrix exponentials, nodal analysis, field solutions.'],
  ['Tables and examples', 'Numbers of tables, standards and textbooks stand with the digits that were printed. Allowed is their rounding, or the accuracy that the method states.'],
  ['Limits', 'A published limit is marked “at most” or “at least”: the engine must stay within it.'],
  ['Difference', 'Relative to the published value, absolute where that is zero. Digits that agree are dark; those after them are grey.'],
] as const;

/** How to read the record. */
export function Reading() {
  return (
    <dl aria-label="How to read the record" className="mt-7 grid gap-x-8 gap-y-4 sm:grid-cols-2 lg:grid-cols-4">
      {parts.map(([title, text]) => (
        <div key={title}>
          <dt className="text-small font-[550]">{title}</dt>
          <dd className="mt-0.5 text-small text-ash">{text}</dd>
        </div>
      ))}
    </dl>
  );
}
