/** The first stop of the keyboard: past the navigation. */
export function SkipLink() {
  return (
    <a href="#content" className="sr-only rounded-field bg-copper px-3 py-1.5 text-small text-paper focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:z-20 focus:px-3 focus:py-1.5">
      Skip to content
    </a>
  );
}
