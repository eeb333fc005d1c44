/** `npm run golden`: writes golden.json again, after a change of numbers that the engine version and CHANGELOG.md tell of. */
import { writeFileSync } from 'node:fs';
import { goldenNow } from './golden';

writeFileSync(new URL('golden.json', import.meta.url), `${JSON.stringify(goldenNow(), null, 1)}\n`);
