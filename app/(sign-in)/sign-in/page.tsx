import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { PageTitle } from '@/app/_components/page-title';
import { PublicFrame } from '@/app/_components/public-frame';
import { currentMember } from '@/lib/auth/current-member';
import { SignInForm } from './sign-in-form';
import { sameSitePath } from './same-site-path';

export const metadata: Metadata = { title: 'Sign in' };

interface SignInPageProps {
  readonly searchParams: Promise<{ readonly next?: string | readonly string[] }>;
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  const next = sameSitePath((await searchParams).next);
  // The form must open also while the database is away: it then says so when it is sent.
  const member = await currentMember().catch(() => null);
  if (member) redirect(next ?? '/console');
  return (
    <PublicFrame signIn={false}>
      <div className="max-w-[22rem]">
        <PageTitle title="Sign in">For members of an organization. Scripts use an API key instead.</PageTitle>
        <SignInForm next={next} />
      </div>
    </PublicFrame>
  );
}
