import type { Metadata } from 'next';
import { ChangePasswordForm } from '@/components/people/change-password-form';
import { Notice } from '@/components/ui/notice';
import { PageBody, PageHeader } from '@/components/ui/page';
import { Panel } from '@/components/ui/panel';
import { ROLE_DESCRIPTIONS, ROLE_LABELS } from '@/lib/domain/access';
import { loadPage } from '@/lib/http/load-page';
import { loadAccount } from '@/lib/services/session/load-account';
import { changePasswordAction } from './actions';

export const metadata: Metadata = { title: 'Your account' };

export default async function AccountPage({ searchParams }: { searchParams: Promise<{ changed?: string }> }) {
  const [account, { changed }] = await Promise.all([loadPage(loadAccount), searchParams]);
  return (
    <PageBody narrow>
      <PageHeader title={account.displayName} lead={account.email} />
      <div className="space-y-6">
        {changed && (
          <Notice tone="done" live title="Your password is changed.">
            Every other device is signed out.
          </Notice>
        )}
        <Panel title="Your roles">
          <dl className="space-y-2">
            {account.roles.map((role) => (
              <div key={role}>
                <dt className="font-semibold">{ROLE_LABELS[role]}</dt>
                <dd className="text-ink-soft">{ROLE_DESCRIPTIONS[role]}</dd>
              </div>
            ))}
          </dl>
          <p className="mt-3 text-sm text-ink-soft">A lead of your site can change them.</p>
        </Panel>
        <Panel title="Signing out">
          <dl className="space-y-2">
            <div>
              <dt className="font-semibold">Sign out</dt>
              <dd className="text-ink-soft">This browser forgets that you are signed in. Other devices stay signed in, each for up to 12 hours.</dd>
            </div>
            <div>
              <dt className="font-semibold">Sign out everywhere</dt>
              <dd className="text-ink-soft">Every session ends at once, here and on all other devices. Use it when a device is lost, or someone may have copied a session.</dd>
            </div>
          </dl>
          <p className="mt-3 text-sm text-ink-soft">Both are in the menu under your name.</p>
        </Panel>
        <Panel title="Password">
          <ChangePasswordForm email={account.email} changePassword={changePasswordAction} />
        </Panel>
      </div>
    </PageBody>
  );
}
