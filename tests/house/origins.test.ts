/** Nothing is fetched from anywhere else: no remote font, script, style, image or call home. */
import { describe, expect, it } from 'vitest';
import { sourceFiles, sourceText } from '../support/source-files';

/** Names in namespaces, and pages that comments point to; nothing is loaded from them. */
const named = ['www.w3.org', 'json-schema.org', 'spec.openapis.org', 'www.rfc-editor.org', 'datatracker.ietf.org', 'physics.nist.gov', 'dlmf.nist.gov', 'doi.org', 'nextjs.org'];
/** This machine, and names that can belong to nobody (RFC 2606, RFC 6761). */
const nowhere = /^(localhost|127\.0\.0\.1|0\.0\.0\.0|\[::1\]|example\.(com|org|net)|([a-z0-9-]+\.)*(example|invalid|test|localhost))$/;

const shipped = sourceFiles().filter(
  (file) => /^(app|lib|db|openapi|public|scripts)\//.test(file) || /^[^/]+\.(ts|mjs)$/.test(file),
);
const texts = shipped.filter((file) => /\.(ts|tsx|mjs|js|css|svg|json|html|txt|webmanifest)$/.test(file)).map((file) => ({ file, text: sourceText(file) }));

describe('the source', () => {
  it('names no remote origin but those of standards and documentation', () => {
    const found = texts.flatMap(({ file, text }) =>
      [...text.matchAll(/\b(?:https?|wss?):\/\/([a-z0-9.[\]:-]+)/gi)]
        .map((match) => (match[1] ?? '').replace(/:\d+$/, '').replace(/[.:]+$/, '').toLowerCase())
        // One label without a dot is a placeholder, or `new URL(path, …)` asking for a base.
        .filter((host) => host.includes('.') && !nowhere.test(host) && !named.includes(host))
        .map((host) => `${file}: ${host}`),
    );
    expect(found).toEqual([]);
  });

  it('loads no protocol-relative address', () => {
    const found = texts.filter(({ file, text }) => /\.(css|svg|html|tsx)$/.test(file) && /(?:url\(\s*['"]?|(?:src|href)=['"])\/\//.test(text));
    expect(found.map(({ file }) => file)).toEqual([]);
  });

  it('takes its fonts from its own packages', () => {
    expect(texts.filter(({ text }) => /next\/font\/google/.test(text)).map(({ file }) => file)).toEqual([]);
    const external = texts.filter(({ file }) => file.endsWith('.css')).filter(({ text }) => /@import\s+(url\(\s*)?['"]?(https?:)?\/\//.test(text));
    expect(external.map(({ file }) => file)).toEqual([]);
  });
});
