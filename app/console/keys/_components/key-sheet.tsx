'use client';

import type { ReactNode } from 'react';
import Link from 'next/link';
import { Button } from '@/app/_components/button';
import { Dialog } from '@/app/_components/dialog';
import { LocalTime } from '@/app/_components/local-time';
import { QuotaPair } from '@/app/console/_components/quota-pair';
import { formatCount } from '@/app/_format/numbers';
import { scopeMeanings } from '@/lib/auth/permissions';
import { stateColours, type Key } from './key';

interface KeySheetProps {
  readonly shown: Key;
  readonly canManage: boolean;
  readonly onChange: () => void;
  readonly onRevoke: () => void;
  readonly onClose: () => void;
}

/** Everything about one key, also what a narrow screen leaves out of the table. */
export function KeySheet({ shown: key, canManage, onChange, onRevoke, onClose }: KeySheetProps) {
  return (
    <Dialog title={key.name} wide onClose={onClose}>
      <dl className="grid gap-x-6 gap-y-2 text-[14px] sm:grid-cols-[9rem_1fr] sm:gap-y-2.5">
        <Entry label="State">
          <span className={stateColours[key.state]}>{key.state}</span>
          {key.revoked_at && (
            <>
              {' since '}
              <LocalTime iso={key.revoked_at} />
            </>
          )}
        </Entry>
        <Entry label="Key">
          <code className="font-mono text-[13px]">{key.display}</code>
        </Entry>
        <Entry label="Scopes">
          <ul className="grid gap-0.5">
            {key.scopes.map((scope) => (
              <li key={scope}>
                <code className="inline-block min-w-[9.5rem] font-mono text-[13px]">{scope}</code> <span className="text-ash">{scopeMeanings[scope]}</span>
              </li>
            ))}
          </ul>
        </Entry>
        <Entry label="Used this month">
          <span className="font-mono text-[13px]">
            {formatCount(key.units_used)} of {formatCount(key.monthly_unit_quota)} units
          </span>
          <QuotaPair used={key.units_used} quota={key.monthly_unit_quota} className="mt-1 max-w-64" />
        </Entry>
        <Entry label="Burst limit">
          <span className="font-mono text-[13px]">{formatCount(key.requests_per_minute)} requests/min</span>
        </Entry>
        <Entry label="Allowed addresses">
          {key.allowed_addresses.length === 0 ? 'any' : <span className="font-mono text-[13px] wrap-anywhere">{key.allowed_addresses.join(', ')}</span>}
        </Entry>
        <Entry label="Expires">{key.expires_at ? <LocalTime iso={key.expires_at} /> : 'never'}</Entry>
        <Entry label="Last used">{key.last_used_at ? <LocalTime iso={key.last_used_at} /> : 'never'}</Entry>
        <Entry label="Issued">
          <LocalTime iso={key.created_at} /> by {key.created_by}
        </Entry>
      </dl>
      <div className="mt-6 flex flex-wrap items-center gap-3">
        {canManage && key.state !== 'revoked' && (
          <>
            <Button variant="ghost" onClick={onChange}>
              Change
            </Button>
            <Button variant="ghost-destructive" onClick={onRevoke}>
              Revoke
            </Button>
          </>
        )}
        <Link href={`/console/calls?key=${key.id}`} className="link text-small">
          Its calls
        </Link>
      </div>
    </Dialog>
  );
}

function Entry({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  return (
    <>
      <dt className="text-ash">{label}</dt>
      <dd className="mb-1.5 min-w-0 wrap-anywhere sm:mb-0">{children}</dd>
    </>
  );
}
