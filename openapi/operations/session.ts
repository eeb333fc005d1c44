/** Signing in to the console. The session is an httpOnly cookie; ending it is immediate, on the server. */
import { roles } from '@/lib/auth/permissions';
import { defineOperation } from '../operation';
import { z } from '../zod';
import { dateTime, lineOfText } from './fields';

export const signInBody = z
  .strictObject({
    email: lineOfText().trim().min(3).max(254).meta({ title: 'E-mail', description: 'Address of the member.', examples: ['marit@saltmarsh.example'] }),
    password: z.string().min(1).max(200).meta({ title: 'Password', description: 'Password of the member.', examples: ['a long passphrase of your own'] }),
  })
  .meta({ id: 'SignIn', description: 'Who signs in.' });

export const sessionSchema = z
  .object({
    member: z
      .object({
        name: z.string().max(200).meta({ description: 'Name of the member.', examples: ['Marit Solberg'] }),
        email: z.string().max(254).meta({ description: 'Address of the member.', examples: ['marit@saltmarsh.example'] }),
        role: z.enum(roles).meta({ description: 'Role in the organization.', examples: ['admin'] }),
      })
      .meta({ description: 'Who is signed in.' }),
    organization: z
      .object({ name: z.string().max(120).meta({ description: 'Name of the organization.', examples: ['Saltmarsh Cable Works'] }) })
      .meta({ description: 'The organization of the member.' }),
    expires_at: dateTime('When the session ends by itself.'),
  })
  .meta({ id: 'Session', description: 'A signed-in member.' });

export const signIn = defineOperation({
  id: 'session.start',
  method: 'post',
  path: '/session',
  tag: 'Session',
  summary: 'Sign in',
  description: 'Checks e-mail and password and sets the session cookie. Tries are limited by address and by account.',
  access: 'public',
  body: signInBody,
  bodyExamples: {
    member: { summary: 'A member of the organization', value: { email: 'marit@saltmarsh.example', password: 'a long passphrase of your own' } },
  },
  answers: { 201: { description: 'Signed in.', schema: sessionSchema, headers: ['Set-Cookie'] } },
  problems: ['sign-in-failed', 'too-many-attempts', 'cross-origin', 'unavailable'],
});

export const readSession = defineOperation({
  id: 'session.read',
  method: 'get',
  path: '/session',
  tag: 'Session',
  summary: 'Read the session',
  description: 'Who is signed in.',
  access: { permission: 'session.read' },
  answers: { 200: { description: 'The session.', schema: sessionSchema } },
});

export const signOut = defineOperation({
  id: 'session.end',
  method: 'delete',
  path: '/session',
  tag: 'Session',
  summary: 'Sign out',
  description: 'Ends the session on the server and clears the cookie.',
  access: { permission: 'session.read' },
  answers: { 204: { description: 'Signed out.', headers: ['Set-Cookie'] } },
});
