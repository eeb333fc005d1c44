/** Every calculation of the service. This list is the only place that knows them all. */
import type { Calculation, Method } from './calculation';
import { dimension } from './calculations/lines/dimension';
import { electricalLength } from './calculations/lines/electrical-length';
import { fromSecondary } from './calculations/lines/from-secondary';
import { primaryConstants } from './calculations/lines/primary-constants';
import { secondaryConstants } from './calculations/lines/secondary-constants';
import { cascade } from './calculations/networks/cascade';
import { convert } from './calculations/networks/convert';
import { inputImpedance } from './calculations/terminations/input-impedance';
import { matching } from './calculations/terminations/matching';
import { powerBudget } from './calculations/terminations/power-budget';
import { reflection } from './calculations/terminations/reflection';
import { standingWave } from './calculations/terminations/standing-wave';

export const calculations: readonly Calculation[] = [primaryConstants, secondaryConstants, fromSecondary, inputImpedance, reflection, standingWave, powerBudget, matching, cascade, convert, electricalLength, dimension];

export function findCalculation(group: string, id: string): Calculation | undefined {
  return calculations.find((calculation) => calculation.group === group && calculation.id === id);
}

/** Every method that some calculation rests on, once. */
export const methods: readonly Method[] = [...new Map(calculations.flatMap((calculation) => calculation.methods).map((method) => [method.id, method])).values()];

export function findMethod(id: string): Method | undefined {
  return methods.find((method) => method.id === id);
}
