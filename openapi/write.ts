/** Writes openapi.json; run after a change of a schema, a calculation or an operation. */
import { writeFileSync } from 'node:fs';
import { buildDocument } from './document';

writeFileSync(new URL('openapi.json', import.meta.url), `${JSON.stringify(buildDocument(), null, 2)}\n`);
