/** The operations of the calculations, made from the registry: nothing here names a single calculation. */
import { calculationPath, type Calculation } from '@/lib/solvers/calculation';
import { defineOperation, type Operation } from '../operation';
import { z } from '../zod';
import { calculationDescriptionSchema, methodUseSchema } from './catalogue';
import { callId } from './fields';

const warningSchema = z
  .object({
    code: z.string().max(80).meta({ description: 'Stable word for the kind of warning.', examples: ['pole'] }),
    pointer: z.string().max(500).meta({ description: 'RFC 6901 pointer to what it is about.', examples: ['/input_impedance_ohm'] }),
    detail: z.string().max(2000).meta({ description: 'What to know about the number.', examples: ['no finite value at index 40'] }),
  })
  .meta({ id: 'Warning', description: 'Something to know about a number.' });

const digest = (what: string) =>
  z
    .string()
    .regex(/^[0-9a-f]{64}$/)
    .meta({ description: `SHA-256 of the canonical JSON (RFC 8785) of the ${what}.`, examples: ['9f86d081884c7d659a2feaa0c55ad015a3bf4f1b2b0b822cd15d6c15b0f00a08'] });

/** The parts of every answer; `result` is the calculation's own. */
function answerSchema(calculation: Calculation) {
  return z
    .object({
      id: callId,
      calculation: z.literal(calculationPath(calculation)).meta({ description: 'Group and id of the calculation.', examples: [calculationPath(calculation)] }),
      engine: z.string().max(20).meta({ description: 'Version of the engine that answered.', examples: ['1.0.0'] }),
      result: calculation.output,
      methods: z.array(methodUseSchema).max(50).meta({ description: 'What the numbers rest on.' }),
      warnings: z.array(warningSchema).max(100).meta({ description: 'What to know about the numbers.' }),
      digests: z.object({ input: digest('input, defaults filled in'), result: digest('result') }).meta({ description: 'What the call was about and what it gave, as fingerprints.' }),
      usage: z
        .object({
          units: z.number().int().min(0).max(1e15).meta({ description: 'What the call cost.', examples: [1] }),
          remaining: z.number().int().min(0).max(1e15).meta({ description: 'Units left this month to the caller.', examples: [9999] }),
        })
        .meta({ description: 'Units charged and left.' }),
    })
    .meta({ id: `${schemaName(calculation)}Answer`, description: `Answer of ${calculationPath(calculation)}.` });
}

/** `LinesSecondaryConstants` for lines/secondary-constants. */
function schemaName({ group, id }: Calculation): string {
  return `${group}-${id}`.replace(/(^|-)([a-z])/g, (_, __, letter: string) => letter.toUpperCase());
}

export function computeOperation(calculation: Calculation): Operation {
  const { group, id, title, summary, cost } = calculation;
  return defineOperation({
    id: `${group}.${id.replaceAll('-', '_')}`,
    method: 'post',
    path: `/${group}/${id}`,
    tag: 'Calculations',
    summary: title,
    description: `${summary}\n\nCost: ${cost.rule}.`,
    access: { permission: 'calculations.run', scope: `${group}:run` },
    body: calculation.input,
    bodyExamples: Object.fromEntries(calculation.examples.map(({ name, input }, index) => [`example-${index + 1}`, { summary: name, value: input }])),
    answers: { 200: { description: 'The result with its methods, warnings and digests.', schema: answerSchema(calculation) } },
    problems: ['quota-exceeded'],
  }) as unknown as Operation;
}

export function describeOperation(calculation: Calculation): Operation {
  const { group, id, title } = calculation;
  return defineOperation({
    id: `${group}.${id.replaceAll('-', '_')}.describe`,
    method: 'get',
    path: `/${group}/${id}`,
    tag: 'Catalogue',
    summary: `Describe ${title.toLowerCase()}`.slice(0, 60),
    description: `The same as /calculations/${group}/${id}: schemas, examples, methods and cost rule.`,
    access: 'public',
    answers: { 200: { description: 'The calculation.', schema: calculationDescriptionSchema, headers: ['ETag'] } },
  }) as unknown as Operation;
}
