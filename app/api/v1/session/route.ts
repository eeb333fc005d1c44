import { memberOfSession } from '@/lib/auth/members';
import { endSession } from '@/lib/auth/sessions';
import { signIn } from '@/lib/auth/sign-in';
import * as operations from '@/openapi/operations/session';
import { known } from '../_request/caller';
import { challenge, unknownCaller } from '../_request/identify';
import { Refusal } from '../_request/refusal';
import { reply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(operations.signIn, async ({ body, exchange, request }) => {
    const outcome = await signIn(body, exchange.address, request.headers.get('user-agent'));
    switch (outcome.kind) {
      case 'failed':
        throw new Refusal('sign-in-failed', 'e-mail or password is wrong', { headers: challenge });
      case 'limited':
        throw new Refusal('too-many-attempts', 'signing in was tried too often', {
          headers: { 'Retry-After': String(outcome.retryAfterSeconds) },
        });
      case 'signed-in': {
        const { member, session } = outcome;
        return reply(
          201,
          {
            member: { name: member.name, email: member.email, role: member.role },
            organization: { name: member.organization_name },
            expires_at: session.expiresAt.toISOString(),
          },
          { 'Set-Cookie': session.cookie },
        );
      }
    }
  }),
  handle(operations.readSession, async ({ caller }) => {
    const { sessionId, sessionExpiresAt } = known(caller);
    const member = sessionId && (await memberOfSession(sessionId));
    if (!member || !sessionExpiresAt) throw unknownCaller();
    const { name, email, role, organization } = member;
    return reply(200, { member: { name, email, role }, organization: { name: organization.name }, expires_at: sessionExpiresAt.toISOString() });
  }),
  handle(operations.signOut, async ({ caller }) => {
    const { sessionId } = known(caller);
    if (!sessionId) throw unknownCaller();
    return { status: 204, body: null, headers: { 'Set-Cookie': await endSession(sessionId) } };
  }),
);
