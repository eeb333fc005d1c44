import { issueKey, listKeys } from '@/lib/auth/keys';
import { issueKey as issueOperation, listKeys as listOperation } from '@/openapi/operations/keys';
import { known, knownMember } from '../_request/caller';
import { keyReply, orKeyRefusal } from '../_request/key-replies';
import { reply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(listOperation, async ({ caller }) => reply(200, { data: await listKeys(known(caller).organizationId) })),
  handle(issueOperation, async ({ caller, body }) => {
    const { organizationId, memberId } = knownMember(caller);
    const { key, secret } = await orKeyRefusal(() => issueKey(organizationId, memberId, body));
    return keyReply(201, key, { key, secret }, { Location: `/api/v1/keys/${key.id}` });
  }),
);
