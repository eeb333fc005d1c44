import { describe, expect, it } from 'vitest';
import { buildDocument } from '@/openapi/document';
import { sourceText } from '../support/source-files';

describe('the committed openapi.json', () => {
  it('is what the operations and schemas say now (otherwise: npm run openapi)', () => {
    const committed = sourceText('openapi/openapi.json');
    // Compared as values first, for a difference that can be read.
    expect(JSON.parse(committed)).toEqual(JSON.parse(JSON.stringify(buildDocument())));
    expect(committed).toBe(`${JSON.stringify(buildDocument(), null, 2)}\n`);
  });
});
