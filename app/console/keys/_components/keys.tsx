'use client';

import { useCallback, useState } from 'react';
import useSWR from 'swr';
import { Button } from '@/app/_components/button';
import { EmptyState } from '@/app/_components/empty-state';
import { FailureNotice } from '@/app/_components/failure-notice';
import { LoadingPair } from '@/app/_components/loading-pair';
import { PageTitle } from '@/app/_components/page-title';
import { ChangeKeyDialog } from './change-key-dialog';
import { IssueKeyDialog } from './issue-key-dialog';
import { IssuedKeyDialog } from './issued-key-dialog';
import type { IssuedKey, Key } from './key';
import { KeySheet } from './key-sheet';
import { KeyTable } from './key-table';
import { RevokeKeyDialog } from './revoke-key-dialog';

type Open =
  | { readonly what: 'issue' }
  | { readonly what: 'issued'; readonly issued: IssuedKey }
  | { readonly what: 'sheet' | 'change' | 'revoke'; readonly key: Key };

export function Keys({ canManage }: { readonly canManage: boolean }) {
  const { data, error, mutate } = useSWR<{ readonly data: readonly Key[] }>('/keys');
  const [open, setOpen] = useState<Open | null>(null);
  const close = () => setOpen(null);
  const issue = () => setOpen({ what: 'issue' });
  const look = useCallback((key: Key) => setOpen({ what: 'sheet', key }), []);

  function closeAndReload() {
    close();
    void mutate();
  }

  const actions = canManage && data && data.data.length > 0 && <Button onClick={issue}>Issue a key</Button>;
  return (
    <>
      <PageTitle title="Keys" actions={actions}>
        A key lets a script, a test bench or a pipeline call the API within its scopes and quota. Every call is logged under its key.
      </PageTitle>
      {error && <FailureNotice error={error} onRetry={() => void mutate()} className="mb-5" />}
      {!data && !error && <LoadingPair label="Reading the keys" />}
      {data && data.data.length > 0 && <KeyTable keys={data.data} onOpen={look} />}
      {data && data.data.length === 0 && <NoKeys onIssue={canManage ? issue : null} />}

      {open?.what === 'issue' && (
        <IssueKeyDialog
          onClose={close}
          onIssued={(issued) => {
            setOpen({ what: 'issued', issued });
            void mutate();
          }}
        />
      )}
      {open?.what === 'issued' && <IssuedKeyDialog issued={open.issued} onClose={close} />}
      {open?.what === 'sheet' && (
        <KeySheet
          shown={data?.data.find(({ id }) => id === open.key.id) ?? open.key}
          canManage={canManage}
          onClose={close}
          onChange={() => setOpen({ what: 'change', key: open.key })}
          onRevoke={() => setOpen({ what: 'revoke', key: open.key })}
        />
      )}
      {open?.what === 'change' && <ChangeKeyDialog changing={open.key} onClose={close} onChanged={closeAndReload} />}
      {open?.what === 'revoke' && <RevokeKeyDialog revoking={open.key} onClose={close} onRevoked={closeAndReload} />}
    </>
  );
}

function NoKeys({ onIssue }: { readonly onIssue: (() => void) | null }) {
  return (
    <EmptyState
      title="No key yet"
      command={`curl -s ${window.location.origin}/api/v1/calculations`}
      actions={onIssue && <Button onClick={onIssue}>Issue the first key</Button>}
    >
      {onIssue
        ? 'Issue one and the next screen gives you its first call. What there is to compute can be read without a key:'
        : 'An owner or admin of the organization issues keys. What there is to compute can be read without one:'}
    </EmptyState>
  );
}
