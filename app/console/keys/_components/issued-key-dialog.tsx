'use client';

import { Button } from '@/app/_components/button';
import { CodeBlock } from '@/app/_components/code-block';
import { CopyButton } from '@/app/_components/copy-button';
import { Dialog } from '@/app/_components/dialog';
import { Notice } from '@/app/_components/notice';
import { firstCall } from '@/app/console/_components/first-call';
import type { IssuedKey } from './key';

interface IssuedKeyDialogProps {
  readonly issued: IssuedKey;
  readonly onClose: () => void;
}

/** The only time the secret is seen. Nothing but the button closes it: a slipped Escape would lose a key. */
export function IssuedKeyDialog({ issued: { key, secret }, onClose }: IssuedKeyDialogProps) {
  const call = firstCall(window.location.origin, key.scopes);
  return (
    <Dialog title={`Key ${key.name}`} wide dismissible={false} onClose={onClose}>
      <Notice tone="warning" title="Shown this once.">
        Store the key now, in a secret store or a file only you can read. Nobody can show it again, neither can we; a lost key is revoked and replaced.
      </Notice>
      <div className="mt-4 flex flex-wrap items-start gap-x-3 gap-y-2 rounded-field border border-edge bg-sheet px-3.5 py-3">
        <code data-secret className="min-w-0 flex-1 basis-56 font-mono text-[14px] leading-[1.6] font-medium break-all select-all">
          {secret}
        </code>
        <CopyButton text={secret} of="the key" />
      </div>
      <h3 className="mt-6 text-small font-semibold">Make the first call</h3>
      <p className="mt-0.5 text-small text-ash">Put the key into the variable of your shell, then paste the rest as it stands.</p>
      <CodeBlock code={`export LINEWRIGHT_KEY=${secret}\n\n${call}`} label="first call" className="mt-2.5" />
      <Button className="mt-6" onClick={onClose}>
        I have stored it
      </Button>
    </Dialog>
  );
}
