import { engineVersion } from '@/lib/solvers/engine';
import { readHealth } from '@/openapi/operations/service';
import { reply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(readHealth, () => reply(200, { status: 'up', engine: engineVersion })),
);
