import type { Metadata } from 'next';
import { DoorPage } from '@/components/people/door-page';
import { PasswordLink } from '@/components/people/password-link';
import { inspectLinkAction, setPasswordAction } from './actions';

export const metadata: Metadata = { title: 'Choose a password', referrer: 'no-referrer' };

export default function SetPasswordPage() {
  return (
    <DoorPage title="Choose a password">
      <PasswordLink inspectLink={inspectLinkAction} setPassword={setPasswordAction} />
    </DoorPage>
  );
}
