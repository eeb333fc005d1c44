/** The state of the service, and the document itself. */
import { defineOperation } from '../operation';
import { z } from '../zod';

const stateSchema = (id: string, description: string, state: string) =>
  z.object({ status: z.literal(state).meta({ description, examples: [state] }), engine: z.string().max(20).meta({ description: 'Version of the engine.', examples: ['1.0.0'] }) }).meta({ id, description });

export const readHealth = defineOperation({
  id: 'service.health',
  method: 'get',
  path: '/health',
  tag: 'Service',
  summary: 'Is the process up',
  description: 'Answers as long as the process runs, whatever the database does.',
  access: 'public',
  unlimited: true,
  answers: { 200: { description: 'The process is up.', schema: stateSchema('Health', 'The process is up.', 'up') } },
});

export const readReadiness = defineOperation({
  id: 'service.ready',
  method: 'get',
  path: '/ready',
  tag: 'Service',
  summary: 'Can it answer calls',
  description: 'Asks the database; 503 while it is out of reach.',
  access: 'public',
  unlimited: true,
  answers: { 200: { description: 'The database answers.', schema: stateSchema('Readiness', 'The service can answer calls.', 'ready') } },
  problems: ['unavailable'],
});

export const readDocument = defineOperation({
  id: 'service.document',
  method: 'get',
  path: '/openapi.json',
  tag: 'Service',
  summary: 'Read this document',
  description: 'The OpenAPI 3.1 document of the API, with an ETag.',
  access: 'public',
  answers: {
    200: {
      description: 'The document.',
      schema: z.looseObject({ openapi: z.string().max(10).meta({ description: 'Version of OpenAPI.', examples: ['3.1.0'] }) }).meta({ id: 'OpenApiDocument', description: 'An OpenAPI 3.1 document.' }),
      headers: ['ETag'],
    },
  },
});
