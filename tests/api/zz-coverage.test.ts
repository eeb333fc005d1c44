import { expect, test } from 'vitest';
import { documentedOperations } from '../support/document';
import { observedPairs } from '../support/observed';

/** Last of the folder by its name. What is documented but was never answered may as well not exist. */
test('every documented status of every operation was answered in this run', () => {
  const observed = observedPairs();
  const documented = documentedOperations.flatMap(({ id, answers }) => Object.keys(answers).map((status) => `${id} ${status}`));
  expect(documented.length).toBeGreaterThan(100);
  expect(documented.filter((pair) => !observed.has(pair))).toEqual([]);
});
