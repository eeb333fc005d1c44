/** The catalogue: what the registry says of calculations and methods, as the API shows it. */
import { z } from 'zod';
import { calculationPath, type Calculation } from '@/lib/solvers/calculation';
import { calculations, findMethod, methods } from '@/lib/solvers/registry';
import { taggedReply, type Reply } from './respond';
import { Refusal } from './refusal';

/** Descriptions never change while the process runs, and the schemas are costly to write out. */
const written = new Map<Calculation, string>();

export function describe(calculation: Calculation): Reply {
  let text = written.get(calculation);
  if (text === undefined) {
    text = JSON.stringify({
      ...summaryOf(calculation),
      methods: calculation.methods.map(({ id, title, source, range, accuracy }) => ({ id, title, source, range, accuracy })),
      input_schema: z.toJSONSchema(calculation.input, { io: 'input' }),
      output_schema: z.toJSONSchema(calculation.output, { io: 'output' }),
      examples: calculation.examples.map(({ name, input, source }) => ({ name, input, source })),
    });
    written.set(calculation, text);
  }
  return taggedReply(text);
}

export function listCalculations(): Reply {
  return taggedReply(JSON.stringify({ data: calculations.map(summaryOf) }));
}

export function listMethods(): Reply {
  return taggedReply(JSON.stringify({ data: methods }));
}

export function describeMethod(id: string): Reply {
  const method = findMethod(id);
  if (!method) throw new Refusal('not-found', 'there is no method of this id');
  return taggedReply(JSON.stringify(method));
}

function summaryOf(calculation: Calculation) {
  const { id, group, title, summary, cost } = calculation;
  return { id, group, path: calculationPath(calculation), title, summary, cost: cost.rule };
}
