/** The files of the repository that people wrote, by their path from its root. */
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));

/** Made by tools, or brought by them. */
const notOurs = /^(node_modules|\.git|\.data|\.next.*|test-results)$/;

export function sourceFiles(folder = ''): string[] {
  return readdirSync(join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    if (notOurs.test(entry.name)) return [];
    const path = folder ? `${folder}/${entry.name}` : entry.name;
    return entry.isDirectory() ? sourceFiles(path) : [path];
  });
}

export function sourceFolders(): string[] {
  const folders = new Set<string>();
  for (const file of sourceFiles()) {
    const parts = file.split('/').slice(0, -1);
    parts.forEach((_part, index) => folders.add(parts.slice(0, index + 1).join('/')));
  }
  return [...folders].sort();
}

export function sourceText(path: string): string {
  return readFileSync(join(root, path), 'utf8');
}
