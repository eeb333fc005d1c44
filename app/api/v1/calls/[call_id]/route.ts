import { readCall } from '@/lib/calls/calls';
import { readCall as readCallOperation } from '@/openapi/operations/calls';
import { ownCallsOnly } from '../../_request/caller';
import { found } from '../../_request/refusal';
import { reply } from '../../_request/respond';
import { handle, serve } from '../../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(readCallOperation, async ({ caller, parameters }) => {
    const { organizationId, memberId } = ownCallsOnly(caller);
    return reply(200, found(await readCall(organizationId, parameters.call_id, memberId)));
  }),
);
