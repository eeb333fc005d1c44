'use client';

import { useSyncExternalStore } from 'react';
import { CodeBlock } from '@/app/_components/code-block';
import { Tabs } from '@/app/_components/tabs';
import { snippetsOf } from './snippets';

/** The same call for a script, at the address that this page itself came from. */
export function SnippetTabs({ path, input }: { readonly path: string; readonly input: unknown }) {
  const origin = useSyncExternalStore(() => () => {}, () => window.location.origin, () => '');
  const snippets = snippetsOf(origin, path, input);
  return (
    <section aria-label="The same call as a script">
      <Tabs label="Language" tabs={snippets.map(({ id, title, code }) => ({ id, title, content: <CodeBlock code={code} label={`${title} snippet`} tall /> }))} />
      <p className="mt-2 text-fine text-ash">Runs as it stands with a key in LINEWRIGHT_KEY.</p>
    </section>
  );
}
