/** Which answers of which operations this run has seen, over all its processes. */
import { appendFileSync, existsSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** One file a run: the run names it, or it is told by the process that started the workers. */
const file = process.env.LINEWRIGHT_OBSERVED ?? join(tmpdir(), `linewright-observed-${process.ppid}.txt`);
const written = new Set<string>();

export function noteObserved(operationId: string, status: number): void {
  const line = `${operationId} ${status}`;
  if (written.has(line)) return;
  written.add(line);
  appendFileSync(file, `${line}\n`);
}

export function observedPairs(): Set<string> {
  return new Set(existsSync(file) ? readFileSync(file, 'utf8').split('\n').filter(Boolean) : []);
}
