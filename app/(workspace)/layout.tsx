import type { ReactNode } from 'react';
import { Header } from '@/components/shell/header';
import { homeFor, navigationFor } from '@/components/shell/navigation';
import { PersonMenu } from '@/components/shell/person-menu';
import { currentTheme } from '@/components/shell/read-theme';
import { SkipLink } from '@/components/shell/skip-link';
import { ThemeSwitch } from '@/components/shell/theme-switch';
import { requireActor } from '@/lib/auth/current-actor';
import { ROLE_LABELS } from '@/lib/domain/access';
import { getSite } from '@/lib/services/site/get-site';
import { signOutEverywhereAction } from './account/actions';

export default async function WorkspaceLayout({ children }: { children: ReactNode }) {
  const actor = await requireActor();
  const [site, theme] = await Promise.all([getSite({ actor }), currentTheme()]);
  return (
    <>
      <SkipLink />
      <Header home={homeFor(actor)} items={navigationFor(actor)}>
        <span className="hidden md:block">
          <ThemeSwitch initial={theme} />
        </span>
        <span className="hidden max-w-48 truncate px-2 text-sm text-ink-soft lg:block">{site.name}</span>
        <PersonMenu
          name={actor.displayName}
          roles={actor.roles.map((role) => ROLE_LABELS[role].toLowerCase()).join(', ')}
          siteName={site.name}
          theme={theme}
          signOutEverywhere={signOutEverywhereAction}
        />
      </Header>
      <main id="main" tabIndex={-1} className="outline-none">
        {children}
      </main>
    </>
  );
}
