import { engineVersion } from '@/lib/solvers/engine';
import { readReadiness } from '@/openapi/operations/service';
import { probeDatabase } from '@/lib/readiness';
import { reply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(readReadiness, async () => {
    await probeDatabase();
    return reply(200, { status: 'ready', engine: engineVersion });
  }),
);
