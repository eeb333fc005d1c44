import { useSyncExternalStore } from 'react';

/** Whether the page is dark now: by the reader's choice, or else by the device. */
export function useDarkness(): boolean {
  return useSyncExternalStore(subscribe, isDark, () => false);
}

function isDark(): boolean {
  const chosen = document.documentElement.dataset.theme;
  return chosen ? chosen === 'dark' : matchMedia('(prefers-color-scheme: dark)').matches;
}

function subscribe(onChange: () => void): () => void {
  const device = matchMedia('(prefers-color-scheme: dark)');
  const choice = new MutationObserver(onChange);
  device.addEventListener('change', onChange);
  choice.observe(document.documentElement, { attributeFilter: ['data-theme'] });
  return () => {
    device.removeEventListener('change', onChange);
    choice.disconnect();
  };
}
