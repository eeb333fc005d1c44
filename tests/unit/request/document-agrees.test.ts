import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { operations } from '@/openapi/operations/all';
import { buildDocument } from '@/openapi/document';
import { document, requestValidator } from '../../support/document';
import { bodiesLike, rightBodies, wrongBodies } from '../../support/generated-bodies';
import type { Json } from '../../support/json';

const seed = 4711;
const withBody = operations.filter(({ body }) => body);

/**
 * The validator says more than the document in these ways only: a text is trimmed before it is measured, a
 * rule across fields carries a code of its own, and JSON Schema counts characters where we count UTF-16 units.
 */
function isBeyondSchema(issue: z.core.$ZodIssue, body: Json): boolean {
  if (issue.code === 'invalid_union') return issue.errors.some((branch) => branch.length > 0 && branch.every((inner) => isBeyondSchema(inner, body)));
  if (issue.code === 'custom') return issue.params?.code !== undefined;
  const value = issue.path.reduce<Json>((node, part) => node?.[part], body);
  return typeof value === 'string' && (value !== value.trim() || value.length !== [...value].length);
}

describe('the published document', () => {
  test('is what the declarations give now', () => {
    expect(document).toEqual(JSON.parse(JSON.stringify(buildDocument())));
  });

  for (const operation of withBody) {
    const { path, method } = operation;
    const accepts = requestValidator({ path, method });
    const schema = document.paths[path][method].requestBody.content['application/json'].schema;

    // zod's own account of the schema: where the document is narrower, only bodies made from this one show it.
    const own = z.toJSONSchema(operation.body!, { io: 'input' });

    const examples = Object.values(operation.bodyExamples ?? {}).map(({ value }) => value as Json);

    test(`accepts for ${operation.id} what the validator accepts, and refuses what it refuses`, () => {
      let accepted = 0;
      let refused = 0;
      fc.assert(
        fc.property(fc.oneof(rightBodies(schema), wrongBodies(schema), rightBodies(own, own), wrongBodies(own, own), bodiesLike(examples)), (generated) => {
          // Through text, as a body comes.
          const body = JSON.parse(JSON.stringify(generated));
          const parsed = operation.body!.safeParse(body, { reportInput: true });
          const byDocument = accepts(body);
          if (parsed.success) accepted++;
          else refused++;
          if (parsed.success === byDocument) return;
          const told = `${JSON.stringify(body).slice(0, 600)}\ndocument: ${JSON.stringify(accepts.errors?.slice(0, 3))}\nvalidator: ${JSON.stringify(parsed.error?.issues.slice(0, 3))}`;
          expect(parsed.success, `the document refuses what the validator accepts\n${told}`).toBe(false);
          expect(parsed.error!.issues.every((issue) => isBeyondSchema(issue, body)), `the document accepts what the validator refuses\n${told}`).toBe(true);
        }),
        { numRuns: 1500, seed },
      );
      expect(accepted, 'right bodies must be among those made').toBeGreaterThan(50);
      expect(refused, 'wrong bodies must be among those made').toBeGreaterThan(50);
    });
  }
});
