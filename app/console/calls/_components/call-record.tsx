'use client';

import Link from 'next/link';
import type { ReactNode } from 'react';
import useSWR from 'swr';
import { asProblem, type ProblemField } from '@/app/_api/client';
import { ButtonLink } from '@/app/_components/button';
import { CodeBlock } from '@/app/_components/code-block';
import { CopyButton } from '@/app/_components/copy-button';
import { FailureNotice } from '@/app/_components/failure-notice';
import { Figure, Figures } from '@/app/_components/figure';
import { LoadingPair } from '@/app/_components/loading-pair';
import { LocalTime } from '@/app/_components/local-time';
import { PageTitle } from '@/app/_components/page-title';
import { curlCommand } from '@/app/_format/curl';
import { readableJson } from '@/app/_format/json';
import { formatCount, formatMilliseconds } from '@/app/_format/numbers';
import { isProblemSlug, problemKind } from '@/lib/problems/problems';
import { callerOf, statusColour, type CallDetail } from './call';

export function CallRecord({ callId }: { readonly callId: string }) {
  // A logged call never changes; looking at the window again need not read it again.
  const { data: call, error, mutate } = useSWR<CallDetail>(`/calls/${encodeURIComponent(callId)}`, { revalidateOnFocus: false });
  if (error) return asProblem(error).status === 404 || asProblem(error).status === 422 ? <UnknownCall callId={callId} /> : <FailureNotice error={error} onRetry={() => void mutate()} className="mt-8" />;
  if (!call) return <LoadingPair label="Reading the call" className="mt-10" />;
  return (
    <>
      <PageTitle title={call.calculation} actions={<ButtonLink href="/console/calls">All calls</ButtonLink>}>
        <span className="font-mono text-small wrap-anywhere">{call.id}</span>
      </PageTitle>
      <Figures className="mb-6">
        <Figure label="Status" value={<span className={statusColour(call.status)}>{call.status}</span>} />
        <Figure label="Units" value={formatCount(call.units)} />
        <Figure label="Duration" value={formatMilliseconds(call.duration_ms)} unit="ms" />
        <Figure label="Time" value={<LocalTime iso={call.created_at} />} />
      </Figures>
      {call.problem && <Refused code={call.problem} errors={errorsOf(call.answer)} />}
      <dl className="mb-7 grid gap-x-8 border-t border-rule pt-3 text-[14px] lg:grid-cols-2">
        <Entry label="Caller">{callerOf(call)}</Entry>
        <Entry label="Request id" copy={call.request_id}>
          <Mono>{call.request_id}</Mono>
        </Entry>
        <Entry label="Address">{call.address ? <Mono>{call.address}</Mono> : 'not recorded'}</Entry>
        <Entry label="Caller’s request id">{call.client_request_id ? <Mono>{call.client_request_id}</Mono> : 'none sent'}</Entry>
        <Entry label="Input digest" copy={call.digests.input}>
          {call.digests.input ? <Mono>{call.digests.input}</Mono> : 'none: the input was refused'}
        </Entry>
        <Entry label="Result digest" copy={call.digests.result}>
          {call.digests.result ? <Mono>{call.digests.result}</Mono> : 'none: there was no result'}
        </Entry>
        <Entry label="Engine">
          <Mono>{call.engine}</Mono>
        </Entry>
      </dl>
      <div className="grid gap-8 lg:grid-cols-2">
        <Document title="Request" content={call.request} absent="The request body was not kept." />
        <Document title="Answer" content={call.answer} absent="The answer was not kept. The same request on the same engine computes it again, to the byte." />
      </div>
      {isRecord(call.request) && (
        <section className="mt-8">
          <h2 className="mb-2 text-heading font-semibold">Make this call again</h2>
          <CodeBlock code={curlCommand(window.location.origin, call.calculation, call.request)} label="command" />
        </section>
      )}
    </>
  );
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** The wrong fields, where the refusal was kept and names any. */
function errorsOf(answer: unknown): readonly ProblemField[] {
  return isRecord(answer) && Array.isArray(answer.errors) ? (answer.errors as ProblemField[]) : [];
}

function Refused({ code, errors }: { readonly code: string; readonly errors: readonly ProblemField[] }) {
  if (!isProblemSlug(code)) return <p className="mb-6 font-mono text-small text-garnet">{code}</p>;
  const { title, remedy } = problemKind(code);
  return (
    <div className="mb-6 max-w-measure border-l-[3px] border-garnet py-0.5 pl-3 text-small wrap-anywhere">
      <b className="font-semibold text-garnet">{title}.</b> {remedy}{' '}
      <Link href={`/problems/${code}`} className="link">
        More
      </Link>
      {errors.length > 0 && (
        <ul className="mt-1.5 grid gap-0.5">
          {errors.map(({ pointer, parameter, detail }) => (
            <li key={`${pointer ?? parameter} ${detail}`}>
              {pointer && <code className="mr-2 font-mono text-[12.5px] text-ash">{pointer}</code>}
              {detail}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}

function Document({ title, content, absent }: { readonly title: string; readonly content: unknown; readonly absent: string }) {
  return (
    <section className="min-w-0">
      <h2 className="mb-2 text-heading font-semibold">{title}</h2>
      {content === null || content === undefined ? <p className="max-w-measure text-ash">{absent}</p> : <CodeBlock code={readableJson(content)} label={title.toLowerCase()} tall />}
    </section>
  );
}

function Entry({ label, copy, children }: { readonly label: string; readonly copy?: string | null; readonly children: ReactNode }) {
  return (
    <div className="grid min-h-8 grid-cols-[8.5rem_1fr] items-center gap-x-3 py-0.5">
      <dt className="text-ash">{label}</dt>
      <dd className="flex min-w-0 items-center gap-x-3">
        <span className="min-w-0 flex-1 truncate" title={copy ?? undefined}>
          {children}
        </span>
        {copy && <CopyButton text={copy} of={label.toLowerCase()} />}
      </dd>
    </div>
  );
}

function Mono({ children }: { readonly children: ReactNode }) {
  return <span className="font-mono text-[13px]">{children}</span>;
}

function UnknownCall({ callId }: { readonly callId: string }) {
  return (
    <>
      <PageTitle title="No such call">
        The log of this organization has no call <span className="font-mono text-small wrap-anywhere">{callId}</span> that you may read. Check the id for a missing character.
      </PageTitle>
      <ButtonLink href="/console/calls">All calls</ButtonLink>
    </>
  );
}
