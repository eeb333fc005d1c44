'use client';

import { useEffect, useState } from 'react';

interface CopyButtonProps {
  readonly text: string;
  /** What is copied, for those who do not see where the button stands. */
  readonly of: string;
  readonly className?: string;
}

export function CopyButton({ text, of, className = '' }: CopyButtonProps) {
  const [state, setState] = useState<'ready' | 'copied' | 'refused'>('ready');

  useEffect(() => {
    if (state === 'ready') return;
    const timer = setTimeout(() => setState('ready'), 2000);
    return () => clearTimeout(timer);
  }, [state]);

  async function copy() {
    // Without a secure context there is no clipboard; the person then selects the text.
    const copied = await navigator.clipboard?.writeText(text).then(() => true, () => false);
    setState(copied ? 'copied' : 'refused');
  }

  const words = { ready: 'Copy', copied: 'Copied', refused: 'Select it by hand' }[state];
  return (
    <button
      type="button"
      onClick={copy}
      aria-label={state === 'ready' ? `Copy ${of}` : undefined}
      className={`rounded-field border border-rule bg-sheet px-2 py-0.5 font-sans text-fine text-ash hover:border-edge hover:text-ink ${className}`}
    >
      <span aria-live="polite">{words}</span>
    </button>
  );
}
