'use client';

import { ApiReferenceReact } from '@scalar/api-reference-react';
import '@scalar/api-reference-react/style.css';
import type { ComponentProps } from 'react';
import './viewer.css';
import { useDarkness } from './use-darkness';

/**
 * Everything stays on this site: no fonts, telemetry, assistant or proxy of others. A key that is typed
 * in to try a call is held in the page's memory and nowhere else.
 */
const configuration: ComponentProps<typeof ApiReferenceReact>['configuration'] = {
  url: '/api/v1/openapi.json',
  servers: [{ url: '/api/v1' }],
  theme: 'none',
  withDefaultFonts: false,
  telemetry: false,
  agent: { disabled: true },
  showDeveloperTools: 'never',
  hideClientButton: true,
  hideDarkModeToggle: true,
  persistAuth: false,
  documentDownloadType: 'json',
  defaultHttpClient: { targetKey: 'shell', clientKey: 'curl' },
  hiddenClients: ['c', 'clojure', 'csharp', 'dart', 'fsharp', 'go', 'http', 'java', 'julia', 'kotlin', 'objc', 'ocaml', 'php', 'powershell', 'r', 'ruby', 'rust', 'swift'],
};

export default function Viewer() {
  const dark = useDarkness();
  return (
    <div className="reference mt-4">
      {/* The viewer takes its colours once; a change of theme draws it anew. */}
      <ApiReferenceReact key={String(dark)} configuration={{ ...configuration, forceDarkModeState: dark ? 'dark' : 'light' }} />
    </div>
  );
}
