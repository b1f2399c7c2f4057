import type { Metadata } from 'next';
import Link from 'next/link';
import { AskLinkForm } from '@/components/people/ask-link-form';
import { DoorPage } from '@/components/people/door-page';
import { askForLinkAction } from './actions';

export const metadata: Metadata = { title: 'New password' };

export default function NewPasswordPage() {
  return (
    <DoorPage title="New password" lead="We mail a link to choose one to the address of your account.">
      <AskLinkForm askForLink={askForLinkAction} />
      <p className="mt-5 text-sm">
        <Link href="/sign-in" className="text-link">
          Back to sign-in
        </Link>
      </p>
    </DoorPage>
  );
}
