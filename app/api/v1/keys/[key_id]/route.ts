import { changeKey, readKey, revokeKey } from '@/lib/auth/keys';
import * as operations from '@/openapi/operations/keys';
import { known, knownMember } from '../../_request/caller';
import { keyReply, orKeyRefusal, versionOf } from '../../_request/key-replies';
import { found } from '../../_request/refusal';
import { handle, serve } from '../../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(operations.readKey, async ({ caller, parameters }) => {
    const key = found(await readKey(known(caller).organizationId, parameters.key_id));
    return keyReply(200, key, key);
  }),
  handle(operations.changeKey, async ({ caller, parameters, body, request }) => {
    const { organizationId } = known(caller);
    found(await readKey(organizationId, parameters.key_id));
    const version = versionOf(request);
    const key = found(await orKeyRefusal(() => changeKey(organizationId, parameters.key_id, version, body)));
    return keyReply(200, key, key);
  }),
  handle(operations.revokeKey, async ({ caller, parameters }) => {
    const { organizationId, memberId } = knownMember(caller);
    const key = found(await revokeKey(organizationId, parameters.key_id, memberId));
    return keyReply(200, key, key);
  }),
);
