/** A folder is a room with a purpose, and DEVELOPERS.md says which. */
import { describe, expect, it } from 'vitest';
import { sourceFiles, sourceFolders, sourceText } from '../support/source-files';

const folders = sourceFolders();
const topLevel = folders.filter((folder) => !folder.includes('/'));

/** Where a runner and a framework look, by names that are theirs. */
const fixedByOthers = ['.ci', 'public'];

describe('the folders', () => {
  it('at the top are those whose purpose DEVELOPERS.md tells', () => {
    const rooms = /## Rooms\n([\s\S]*?)\n## /.exec(sourceText('DEVELOPERS.md'))?.[1] ?? '';
    const told = new Set([...rooms.matchAll(/`([a-z]+)(?:\/[^`]*)?`/g)].map((match) => match[1]));
    expect(topLevel.filter((folder) => !fixedByOthers.includes(folder) && !told.has(folder))).toEqual([]);
  });

  it('are named after what is in them, never utils, helpers, common, types or services', () => {
    const vague = /^_?(utils?|helpers?|commons?|types?|services?|shared|misc|lib)$/;
    expect(folders.filter((folder) => vague.test(folder.split('/').pop() ?? '') && folder !== 'lib')).toEqual([]);
  });

  it('and files in them are in kebab-case', () => {
    const names = sourceFiles().filter((file) => /\.(ts|tsx|mjs|css)$/.test(file) && !file.startsWith('db/migrations/')).flatMap((file) => file.split('/'));
    // Besides kebab-case, what the framework reads: [parameter], (group), _private.
    const allowed = /^(_?[a-z0-9]+(-[a-z0-9]+)*(\.[a-z0-9-]+)*|\[{1,2}(\.\.\.)?[a-z0-9_]+\]{1,2}|\([a-z-]+\))$/;
    expect([...new Set(names)].filter((name) => !allowed.test(name))).toEqual([]);
  });
});
