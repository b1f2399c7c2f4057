import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { DoorPage } from '@/components/people/door-page';
import { SignInForm } from '@/components/people/sign-in-form';
import { homeFor } from '@/components/shell/navigation';
import { currentActor } from '@/lib/auth/current-actor';
import { safeReturnPath } from '@/lib/auth/safe-return-path';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({
  searchParams,
}: {
  searchParams: Promise<{ callbackUrl?: string | string[] }>;
}) {
  const [actor, { callbackUrl }] = await Promise.all([currentActor(), searchParams]);
  if (actor) redirect(safeReturnPath(callbackUrl, homeFor(actor)));
  return (
    <DoorPage title="Sign in">
      <SignInForm />
      <p className="mt-5 text-sm">
        <Link href="/sign-in/new-password" className="text-link">
          Forgotten your password?
        </Link>
      </p>
      <p className="mt-2 text-sm text-ink-soft">Accounts are made by the MR lead of your site. The <Link href="/#quick-check" className="text-link">quick check</Link> needs none.</p>
    </DoorPage>
  );
}
