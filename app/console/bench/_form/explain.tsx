'use client';

import { createContext, useContext, useSyncExternalStore, type ReactNode } from 'react';

/** Whether each field shows what it is beneath it; kept in the browser, for it is about the reader. */
const Explaining = createContext(false);

const storageKey = 'linewright-bench-explain';
const changed = 'linewright-bench-explain-changed';

function subscribe(notify: () => void): () => void {
  window.addEventListener(changed, notify);
  return () => window.removeEventListener(changed, notify);
}

export function useExplaining(): boolean {
  return useContext(Explaining);
}

export function ExplainSwitch({ children }: { readonly children: (explainSwitch: ReactNode) => ReactNode }) {
  const explaining = useSyncExternalStore(subscribe, () => window.localStorage.getItem(storageKey) === 'yes', () => false);

  function toggle() {
    window.localStorage.setItem(storageKey, explaining ? 'no' : 'yes');
    window.dispatchEvent(new Event(changed));
  }

  return (
    <Explaining value={explaining}>
      {children(
        <button type="button" aria-pressed={explaining} onClick={toggle} className="text-fine text-ash underline decoration-rule underline-offset-3 hover:text-ink">
          {explaining ? 'Hide explanations' : 'Explain fields'}
        </button>,
      )}
    </Explaining>
  );
}
