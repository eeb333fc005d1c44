import { partsOf, typeset } from './typeset';

/** A formula in a box of its own, which scrolls when a part of it is wider than the screen. */
export function Formula({ latex, label }: { readonly latex: string; readonly label: string }) {
  return (
    <div role="group" aria-label={label} className="flex flex-wrap items-baseline gap-x-12">
      {partsOf(latex).map((part) => (
        // What scrolls must be reachable by keyboard.
        <div key={part} tabIndex={0} className="formula" dangerouslySetInnerHTML={{ __html: typeset(part, { display: true }) }} />
      ))}
    </div>
  );
}

export function Symbol({ latex }: { readonly latex: string }) {
  return <span className="symbol" dangerouslySetInnerHTML={{ __html: typeset(latex) }} />;
}
