/** Who may import whom: the rule bites, says why, and leaves the permitted ways open. */
import { ESLint } from 'eslint';
import { beforeAll, describe, expect, it } from 'vitest';

let eslint: ESLint;

beforeAll(async () => {
  eslint = new ESLint();
  // The first file loads the whole configuration, which takes seconds.
  await eslint.lintText('', { filePath: 'db/new.ts' });
}, 120_000);

async function complaints(filePath: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(code, { filePath });
  return (result?.messages ?? []).filter(({ ruleId }) => ruleId === 'house/imports').map(({ message }) => message);
}

const forbidden: [file: string, code: string, reason: string][] = [
  ['lib/solvers/numeric/kernel.ts', "import '@/lib/solvers/constants';", 'stand alone'],
  ['lib/solvers/numeric/kernel.ts', "import '../constants';", 'stand alone'],
  ['lib/solvers/numeric/kernel.ts', "import 'zod';", 'stand alone'],
  ['lib/solvers/calculations/lines/new.ts', "import '@/db/connection';", 'solvers are pure'],
  ['lib/solvers/calculations/lines/new.ts', "import '../../../problems/problems';", 'solvers are pure'],
  ['lib/solvers/lines/new.ts', "import 'next/headers';", 'solvers are pure'],
  ['lib/solvers/lines/new.ts', "import 'node:crypto';", 'solvers are pure'],
  ['lib/solvers/lines/new.ts', "export * from '@/lib/auth/keys';", 'solvers are pure'],
  ['lib/solvers/lines/new.ts', "await import('@/lib/auth/keys');", 'solvers are pure'],
  ['lib/solvers/lines/new.ts', "import type { Key } from '@/lib/auth/keys';", 'solvers are pure'],
  ['db/new.ts', "import '@/lib/auth/permissions';", 'knows nothing of who asks'],
  ['db/local-server.mjs', "import '../scripts/processes.mjs';", 'knows nothing of who asks'],
  ['lib/auth/new.ts', "import '@/lib/solvers/registry';", 'must not depend on what is computed'],
  ['lib/auth/new.ts', "import '@/lib/calls/call-log';", 'must not depend on what is computed'],
  ['lib/usage/new.ts', "import '@/app/api/v1/_request/serve';", 'never the other way round'],
  ['lib/verification/new.ts', "import '@/lib/calls/calls';", 'nothing that could come between'],
  ['lib/verification/new.ts', "import 'node:fs';", 'nothing that could come between'],
  ['openapi/operations/new.ts', "import '@/lib/auth/keys';", 'made from declarations alone'],
  ['openapi/new.ts', "import '../db/connection';", 'made from declarations alone'],
  ['app/api/v1/new/route.ts', "import '@/db/keys';", 'route files only join'],
  ['app/api/v1/new/route.ts', "import knex from 'knex'; knex({});", 'route files only join'],
  ['app/api/v1/new/route.ts', "import '@/lib/auth/keys'; import '@/lib/solvers/registry';", 'route files only join'],
  ['app/api/v1/new/route.ts', "import '@/lib/calls/calls'; import '../../../../lib/auth/keys';", 'route files only join'],
  ['app/api/v1/_request/new.ts', "import 'pg';", 'queries live in db'],
  ['app/console/keys/page.tsx', "import '@/db/keys';", 'pages reach data through lib'],
  ['app/console/keys/page.tsx', "import '../../../db/keys';", 'pages reach data through lib'],
  ['app/(sign-in)/sign-in/page.tsx', "import 'knex';", 'pages reach data through lib'],
  ['app/console/new/page.tsx', "import '@/lib/auth/keys'; import '@/lib/solvers/registry'; import '@/lib/calls/calls';", 'pages reach data through lib'],
];

describe('an import against the rules of the house is refused with its reason', () => {
  it.each(forbidden)('%s: %s', async (file, code, reason) => {
    const found = await complaints(file, code);
    expect(found).toHaveLength(1);
    expect(found[0]).toContain(reason);
  });
});

const permitted: [file: string, code: string][] = [
  ['lib/solvers/numeric/kernel.ts', "import './complex'; import Complex from 'complex.js'; Complex(1);"],
  ['lib/solvers/lines/new.ts', "import { z } from 'zod'; import '../constants'; import '@/lib/solvers/numeric/roots'; z.string();"],
  ['db/new.ts', "import knex from 'knex'; import './connection'; import '../knexfile'; knex({});"],
  ['lib/auth/new.ts', "import '@/db/keys'; import './permissions'; import 'node:crypto';"],
  ['openapi/new.ts', "import '@/lib/solvers/registry'; import '@/lib/problems/problems'; import '@/lib/auth/permissions';"],
  ['lib/verification/new.ts', "import '../solvers/registry'; import '../../tests/reference/telegrapher.json';"],
  ['app/api/v1/_request/new.ts', "import '@/db/admission'; import '@/lib/auth/keys'; import '@/lib/solvers/registry'; import '@/lib/calls/call-log';"],
  ['app/api/v1/new/route.ts', "import '../_request/serve'; import '@/lib/solvers/registry'; import '@/openapi/operations/keys'; import '@/lib/auth/permissions';"],
  ['app/console/keys/page.tsx', "import '@/lib/auth/current-member'; import '@/lib/auth/keys'; import '@/lib/calls/calls';"],
];

describe('an import within them is not', () => {
  it.each(permitted)('%s: %s', async (file, code) => {
    expect(await complaints(file, code)).toEqual([]);
  });
});
