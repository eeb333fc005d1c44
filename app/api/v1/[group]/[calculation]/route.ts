import { findCalculation } from '@/lib/solvers/registry';
import type { Calculation } from '@/lib/solvers/calculation';
import { describeOperation } from '@/openapi/operations/calculations';
import type { Task } from '../../_request/carry';
import { computeTask } from '../../_request/compute';
import { describe } from '../../_request/describe';
import { handle, serveResolved } from '../../_request/serve';

/** Each calculation's two tasks, made once. */
const tasks = new Map<Calculation, readonly Task[]>();

function tasksOf(calculation: Calculation): readonly Task[] {
  let known = tasks.get(calculation);
  if (!known) {
    known = [computeTask(calculation), handle(describeOperation(calculation), () => describe(calculation))];
    tasks.set(calculation, known);
  }
  return known;
}

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serveResolved(({ group, calculation }) => {
  const found = findCalculation(String(group), String(calculation));
  return found ? tasksOf(found) : null;
});
