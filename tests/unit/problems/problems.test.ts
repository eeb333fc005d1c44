import { STATUS_CODES } from 'node:http';
import { describe, expect, test } from 'vitest';
import { isProblemSlug, problemKind, problemKinds, type ProblemSlug } from '@/lib/problems/problems';
import { problemsOf } from '@/openapi/operation';
import { operations } from '@/openapi/operations/all';

const slugs = Object.keys(problemKinds) as ProblemSlug[];

describe('every kind of problem', () => {
  test('has a status of HTTP, a name fit for a URL, and says what happened and what to do', () => {
    for (const slug of slugs) {
      const { status, title, meaning, remedy } = problemKind(slug);
      expect(slug).toMatch(/^[a-z]+(-[a-z]+)*$/);
      expect(STATUS_CODES[status], slug).toBeDefined();
      expect(status).toBeGreaterThanOrEqual(400);
      expect(title.length).toBeLessThanOrEqual(60);
      for (const sentence of [meaning, remedy]) expect(sentence, slug).toMatch(/^[A-Z].+\.$/s);
    }
  });

  test('has a title of its own', () => {
    expect(new Set(slugs.map((slug) => problemKind(slug).title)).size).toBe(slugs.length);
  });

  test('is documented by some operation, but for a missing method and a failure of ours', () => {
    const documented = new Set(operations.flatMap(problemsOf));
    expect(slugs.filter((slug) => !documented.has(slug)).sort()).toEqual(['internal-error', 'method-not-allowed']);
  });
});

describe('a name of a problem', () => {
  test('is told from anything else, also from what every object inherits', () => {
    for (const slug of slugs) expect(isProblemSlug(slug)).toBe(true);
    for (const other of ['', 'nothing', 'constructor', '__proto__', 'toString', 'Invalid-Input']) expect(isProblemSlug(other)).toBe(false);
  });
});
