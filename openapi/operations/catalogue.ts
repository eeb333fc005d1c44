/** What there is to compute, for people and programs: calculations with schemas and examples, methods with sources. */
import { groups } from '@/lib/solvers/calculation';
import { defineOperation } from '../operation';
import { z } from '../zod';

const methodShape = {
  id: z.string().max(80).meta({ description: 'Identifies the method.', examples: ['telegrapher-two-port'] }),
  title: z.string().max(200).meta({ description: 'What the method is called.', examples: ['Telegrapher two-port, exact'] }),
  source: z.string().max(1000).meta({ description: 'Where it is published.', examples: ['Pozar, Microwave Engineering, 4th ed., table 4.1'] }),
  range: z.string().max(1000).meta({ description: 'Where it holds.', examples: ['any frequency, length and termination'] }),
  accuracy: z.string().max(1000).meta({ description: 'How far off it may be in that range.', examples: ['1e-12 relative'] }),
};

const methodInBriefSchema = z.object(methodShape).meta({ id: 'MethodInBrief', description: 'One published way to compute something, without its formulas.' });

export const methodSchema = z
  .object({
    ...methodShape,
    formulas: z.array(z.string().max(2000).meta({ description: 'One formula, in LaTeX.', examples: [String.raw`\gamma = \sqrt{Z Y}`] })).min(1).max(20).meta({ description: 'Its formulas, in LaTeX.' }),
    symbols: z
      .array(
        z.object({
          symbol: z.string().max(200).meta({ description: 'The symbol, in LaTeX.', examples: [String.raw`\gamma`] }),
          meaning: z.string().max(500).meta({ description: 'What it stands for.', examples: ['propagation constant'] }),
          unit: z.string().max(40).optional().meta({ description: 'Its unit; left out where it has none.', examples: ['1/m'] }),
        }),
      )
      .max(50)
      .meta({ description: 'What the symbols of the formulas stand for.' }),
  })
  .meta({ id: 'Method', description: 'One published way to compute something.' });

export const methodUseSchema = z
  .object({ ...methodShape, in_range: z.boolean().meta({ description: 'Whether this input lies in the range.', examples: [true] }) })
  .meta({ id: 'MethodUse', description: 'A method as an answer rested on it.' });

const summaryShape = {
  id: z.string().max(80).meta({ description: 'Id within the group.', examples: ['secondary-constants'] }),
  group: z.enum(groups).meta({ description: 'Group of the calculation.', examples: ['lines'] }),
  path: z.string().max(120).meta({ description: 'Group and id, as in the URL and the call log.', examples: ['lines/secondary-constants'] }),
  title: z.string().max(120).meta({ description: 'What it is called.', examples: ['Secondary constants'] }),
  summary: z.string().max(1000).meta({ description: 'What it answers.', examples: ['Propagation constant and characteristic impedance of a line.'] }),
  cost: z.string().max(500).meta({ description: 'What a call costs.', examples: ['1 unit per started 1,000 points'] }),
};

const jsonSchema = z.looseObject({}).meta({ id: 'JsonSchema', description: 'A JSON Schema (draft 2020-12).' });

export const calculationDescriptionSchema = z
  .object({
    ...summaryShape,
    methods: z.array(methodInBriefSchema).max(50).meta({ description: 'What it may rest on.' }),
    input_schema: jsonSchema,
    output_schema: jsonSchema,
    examples: z
      .array(
        z.object({
          name: z.string().max(200).meta({ description: 'What the example shows.', examples: ['A 75 ohm line closed by 50 ohm'] }),
          input: z.looseObject({}).meta({ description: 'A request body to send.' }),
          source: z.string().max(1000).meta({ description: 'Where the expected numbers come from.', examples: ['Pozar, example 2.1'] }),
        }),
      )
      .max(100)
      .meta({ description: 'Worked examples.' }),
  })
  .meta({ id: 'CalculationDescription', description: 'A calculation with its schemas, methods and examples.' });

const calculationParameters = z.strictObject({
  group: z.enum(groups).meta({ description: 'Group of the calculation.', examples: ['lines'] }),
  calculation: z.string().max(80).meta({ description: 'Id of the calculation.', examples: ['secondary-constants'] }),
});

export const listCalculations = defineOperation({
  id: 'calculations.list',
  method: 'get',
  path: '/calculations',
  tag: 'Catalogue',
  summary: 'List the calculations',
  description: 'All calculations of the service.',
  access: 'public',
  answers: {
    200: {
      description: 'The calculations.',
      schema: z
        .object({ data: z.array(z.object(summaryShape).meta({ id: 'CalculationSummary', description: 'A calculation in brief.' })).max(1000).meta({ description: 'The calculations.' }) })
        .meta({ id: 'CalculationList', description: 'All calculations.' }),
      headers: ['ETag'],
    },
  },
});

export const describeCalculation = defineOperation({
  id: 'calculations.read',
  method: 'get',
  path: '/calculations/{group}/{calculation}',
  tag: 'Catalogue',
  summary: 'Read one calculation',
  description: 'Schemas, examples, methods and cost rule of one calculation.',
  access: 'public',
  parameters: calculationParameters,
  answers: { 200: { description: 'The calculation.', schema: calculationDescriptionSchema, headers: ['ETag'] } },
});

export const listMethods = defineOperation({
  id: 'methods.list',
  method: 'get',
  path: '/methods',
  tag: 'Catalogue',
  summary: 'List the methods',
  description: 'All methods, with source, range and accuracy.',
  access: 'public',
  answers: {
    200: {
      description: 'The methods.',
      schema: z.object({ data: z.array(methodSchema).max(1000).meta({ description: 'The methods.' }) }).meta({ id: 'MethodList', description: 'All methods.' }),
      headers: ['ETag'],
    },
  },
});

export const readMethod = defineOperation({
  id: 'methods.read',
  method: 'get',
  path: '/methods/{method}',
  tag: 'Catalogue',
  summary: 'Read one method',
  description: 'One method, with source, range and accuracy.',
  access: 'public',
  parameters: z.strictObject({ method: z.string().max(80).meta({ description: 'Id of the method.', examples: ['telegrapher-two-port'] }) }),
  answers: { 200: { description: 'The method.', schema: methodSchema, headers: ['ETag'] } },
});
