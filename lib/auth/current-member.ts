/** Who is looking at a page: the member of the session cookie, asked of the database once a render. */
import { cookies } from 'next/headers';
import { cache } from 'react';
import { memberOfSession, type Member } from './members';
import { readSessionToken, sessionCookie } from './sessions';

export type { Member } from './members';

export const currentMember = cache(async (): Promise<Member | null> => {
  const token = (await cookies()).get(sessionCookie)?.value;
  const sessionId = token ? await readSessionToken(token) : null;
  return sessionId ? memberOfSession(sessionId) : null;
});
