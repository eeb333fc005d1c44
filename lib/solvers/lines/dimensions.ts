/** The dimensions of a geometry: schemas, and what only two of them together can say. */
import { z } from 'zod';
import { conductorProblems, type Conductor } from '../nouns/conductor';

/** From a tenth of a nanometre to a kilometre. */
export const [leastM, mostM] = [1e-10, 1e3];

export const diameter = (title: string, description: string, example: number) => z.number().min(leastM).max(mostM).meta({ title, description, examples: [example], 'x-unit': 'm' });

export const optionalDiameter = (title: string, description: string, example: number) => diameter(title, description, example).optional().meta({ title, description, examples: [example], 'x-unit': 'm' });

type Context = z.core.$RefinementCtx;

/** `larger` must be more than `factor` times `smaller`. */
export function mustExceed<Name extends string>(context: Context, line: Readonly<Record<Name, unknown>>, larger: Name, smaller: Name, factor = 1): void {
  const [above, below] = [line[larger] as number, line[smaller] as number];
  if (above > factor * below) return;
  const bound = factor === 1 ? smaller : factor === 0.5 ? `half of ${smaller}` : `${factor} ${smaller}`;
  context.addIssue({ code: 'custom', path: [larger], params: { code: 'geometry' }, message: `must be greater than ${bound} (${factor * below}); got ${above}` });
}

/** At this temperature a conductor must have a resistivity. */
export function conductorIssues(context: Context, temperatureC: number, ...conductors: readonly (Conductor | undefined)[]): void {
  const problem = conductors.flatMap((each) => (each === undefined ? [] : conductorProblems(each, temperatureC)))[0];
  if (problem) context.addIssue({ code: 'custom', path: ['temperature_c'], params: { code: problem.code }, message: problem.detail.replace(/^temperature_c /, '') });
}
