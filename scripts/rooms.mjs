/**
 * The rooms of the house and who may import whom, as a lint rule. The table is the law; the first entry
 * whose folder holds a file is the one that file answers to. A refusal says why, for a rule without its
 * reason is only in the way.
 */
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const repository = fileURLToPath(new URL('..', import.meta.url));

const database = ['db', 'knex', 'pg', 'knexfile'];

/**
 * `ours`: the only folders and files of this repository it may import; absent: any.
 * `never`: what it may not import, of ours or of packages.
 * `packages`: the only packages it may import; absent: any.
 * `joins`: of how many parts of the way of a request it may import at once; absent: any.
 */
export const rooms = [
  {
    room: 'lib/solvers/numeric',
    ours: ['lib/solvers/numeric'],
    packages: ['complex.js'],
    because: 'numeric kernels stand alone, so that each can be read against its source with nothing else open',
  },
  {
    room: 'lib/solvers',
    ours: ['lib/solvers'],
    packages: ['zod', 'complex.js'],
    because: 'solvers are pure: no framework, database, clock, random or environment, so that the same input gives the same bytes',
  },
  { room: 'db', ours: ['db', 'knexfile'], because: 'db holds queries and knows nothing of who asks or why' },
  { room: 'lib/auth', ours: ['lib/auth', 'db'], because: 'who may do what must not depend on what is computed or how it is answered' },
  {
    room: 'lib/verification',
    ours: ['lib/verification', 'lib/solvers', 'tests/reference'],
    packages: [],
    because: 'what is shown as proof is the engine and the reference data, and nothing that could come between them',
  },
  { room: 'lib', never: ['app', 'openapi', 'next/server'], because: 'lib is what routes and pages stand on, never the other way round' },
  {
    room: 'openapi',
    ours: ['openapi', 'lib/solvers', 'lib/problems', 'lib/auth/permissions'],
    because: 'the document is made from declarations alone, so that it can be written without a database or a server',
  },
  {
    room: 'app/api/v1/_request',
    never: ['knex', 'pg', 'knexfile', 'app/console', 'app/(sign-in)'],
    because: 'a request is carried the same way whoever sends it; queries live in db',
  },
  {
    room: 'app/api',
    never: database,
    joins: 1,
    because: 'route files only join an operation to what it does; the way of a request, with auth, solvers and the call log, is app/api/v1/_request',
  },
  {
    room: 'app',
    never: database,
    joins: 2,
    because: 'pages reach data through lib on the server and through /api/v1 from the client, so that every reader passes the same checks',
  },
];

/** Together they are the path of a request, and that is walked in one place. */
const joined = ['lib/auth', 'lib/solvers', 'lib/calls'];
/** Declarations that carry no power of their own: a role's permissions, who is signed in, the engine's version, types. */
const harmless = ['lib/auth/permissions', 'lib/auth/current-member', 'lib/solvers/engine', 'lib/solvers/calculation', 'lib/calls/call-id'];

const within = (target, folder) => target === folder || target.startsWith(`${folder}/`);
const withoutExtension = (target) => target.replace(/\.(m?[jt]sx?)$/, '');

/** Where an import leads: a path from the root of the repository, a package's name, or a module of Node. */
export function destinationOf(specifier, importer) {
  if (specifier.startsWith('@/')) return { kind: 'ours', target: withoutExtension(specifier.slice(2)) };
  if (specifier.startsWith('.')) {
    return { kind: 'ours', target: withoutExtension(path.posix.join(path.posix.dirname(importer), specifier)) };
  }
  if (specifier.startsWith('node:')) return { kind: 'node', target: specifier };
  return { kind: 'package', target: specifier };
}

/** The reason why `importer` may not import `specifier`, or null. */
export function refusalOf(specifier, importer) {
  const law = rooms.find(({ room }) => within(importer, room));
  if (!law) return null;
  const { kind, target } = destinationOf(specifier, importer);
  const isOneOf = (list) => list.some((entry) => within(target, entry));
  const refused =
    (law.never && isOneOf(law.never)) ||
    (kind === 'ours' && law.ours && !isOneOf(law.ours)) ||
    (kind === 'package' && law.packages && !isOneOf(law.packages)) ||
    (kind === 'node' && law.packages);
  return refused ? `${law.room} may not import '${specifier}': ${law.because}.` : null;
}

const importsRule = {
  meta: { type: 'problem', docs: { description: 'who may import whom, by room' }, schema: [] },
  create(context) {
    const importer = path.relative(repository, context.filename).split(path.sep).join('/');
    const law = rooms.find(({ room }) => within(importer, room));
    const seen = new Set();

    function check(source) {
      if (source?.type !== 'Literal' || typeof source.value !== 'string') return;
      const message = refusalOf(source.value, importer);
      if (message) return context.report({ node: source, message });
      const { target } = destinationOf(source.value, importer);
      const place = harmless.includes(target) ? undefined : joined.find((folder) => within(target, folder));
      if (place) seen.add(place);
    }

    return {
      ImportDeclaration: ({ source }) => check(source),
      ImportExpression: ({ source }) => check(source),
      ExportNamedDeclaration: ({ source }) => check(source),
      ExportAllDeclaration: ({ source }) => check(source),
      'Program:exit'(node) {
        if (law?.joins === undefined || seen.size <= law.joins) return;
        context.report({ node, message: `${law.room} may not join ${[...seen].join(' and ')}: ${law.because}.` });
      },
    };
  },
};

export const housePlugin = { meta: { name: 'house' }, rules: { imports: importsRule } };
