import { readMethod } from '@/openapi/operations/catalogue';
import { describeMethod } from '../../_request/describe';
import { handle, serve } from '../../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(readMethod, ({ parameters }) => describeMethod(parameters.method)),
);
