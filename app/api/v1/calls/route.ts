import { CursorRefused, readCallPage } from '@/lib/calls/calls';
import { listCalls } from '@/openapi/operations/calls';
import { ownCallsOnly } from '../_request/caller';
import { Refusal } from '../_request/refusal';
import { reply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(listCalls, async ({ caller, query }) => {
    const { key, ...filter } = query;
    try {
      return reply(200, await readCallPage({ ...filter, keyId: key, ...ownCallsOnly(caller) }));
    } catch (error) {
      if (!(error instanceof CursorRefused)) throw error;
      throw new Refusal('malformed-request', 'cursor is not one that this list gave', {
        errors: [{ parameter: 'cursor', code: 'invalid_value', detail: 'cursor must be as the last answer gave it, with the same filter' }],
      });
    }
  }),
);
