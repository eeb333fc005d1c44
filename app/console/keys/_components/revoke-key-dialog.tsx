'use client';

import { useState } from 'react';
import { request } from '@/app/_api/client';
import { Button } from '@/app/_components/button';
import { Dialog } from '@/app/_components/dialog';
import { FailureNotice } from '@/app/_components/failure-notice';
import { LocalTime } from '@/app/_components/local-time';
import type { Key } from './key';

interface RevokeKeyDialogProps {
  readonly revoking: Key;
  readonly onRevoked: () => void;
  readonly onClose: () => void;
}

export function RevokeKeyDialog({ revoking: key, onRevoked, onClose }: RevokeKeyDialogProps) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<unknown>(null);

  async function revoke() {
    setBusy(true);
    setFailure(null);
    try {
      await request('DELETE', `/keys/${key.id}`);
      onRevoked();
    } catch (error) {
      setFailure(error);
      setBusy(false);
    }
  }

  return (
    <Dialog title={`Revoke ${key.name}?`} onClose={onClose}>
      <p>
        The next request with <code className="font-mono text-[13px]">{key.display}</code> is refused with 401, wherever it comes from. This cannot be undone; what used the key needs a new one.
      </p>
      <p className="mt-3 text-ash">
        {key.last_used_at ? (
          <>
            Last used <LocalTime iso={key.last_used_at} />.
          </>
        ) : (
          'It has never been used.'
        )}{' '}
        Its calls stay in the log.
      </p>
      {failure !== null && <FailureNotice error={failure} className="mt-4" />}
      <div className="mt-6 flex flex-wrap gap-3">
        <Button variant="destructive" busy={busy} onClick={revoke}>
          {busy ? 'Revoking' : 'Revoke key'}
        </Button>
        <Button variant="ghost" data-first-focus onClick={onClose}>
          Keep it
        </Button>
      </div>
    </Dialog>
  );
}
