import type { Metadata } from 'next';
import { requirePage } from '../../_components/require-page';
import { CallRecord } from '../_components/call-record';

export const metadata: Metadata = { title: 'Call' };

interface CallPageProps {
  readonly params: Promise<{ readonly call_id: string }>;
}

export default async function CallPage({ params }: CallPageProps) {
  const { call_id: callId } = await params;
  await requirePage('/console/calls', `/console/calls/${callId}`);
  return <CallRecord callId={callId} />;
}
