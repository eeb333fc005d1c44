'use client';

import { useState } from 'react';
import { asProblem, request } from '@/app/_api/client';

export function SignOut() {
  const [state, setState] = useState<'in' | 'leaving' | 'failed'>('in');

  async function signOut() {
    setState('leaving');
    try {
      await request('DELETE', '/session');
    } catch (error) {
      // An ended session is what was asked for; the client already leads to sign-in.
      if (asProblem(error).status !== 401) setState('failed');
      return;
    }
    window.location.assign('/sign-in');
  }

  const words = { in: 'Sign out', leaving: 'Signing out', failed: 'Still signed in, try again' }[state];
  return (
    <button type="button" onClick={signOut} disabled={state === 'leaving'} className={`flex-none hover:text-ink ${state === 'failed' ? 'text-garnet' : ''}`}>
      <span aria-live="polite">{words}</span>
    </button>
  );
}
