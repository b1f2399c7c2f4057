import { FoldExample } from '@/components/front/fold-example';
import { FrontText } from '@/components/front/front-text';
import { QuickCheck } from '@/components/quick-check/quick-check';
import { Header } from '@/components/shell/header';
import { homeFor } from '@/components/shell/navigation';
import { currentTheme } from '@/components/shell/read-theme';
import { SkipLink } from '@/components/shell/skip-link';
import { ThemeSwitch } from '@/components/shell/theme-switch';
import { LinkButton } from '@/components/ui/button';
import { currentActor } from '@/lib/auth/current-actor';

export default async function FrontPage() {
  const [actor, theme] = await Promise.all([currentActor(), currentTheme()]);
  const entry = actor
    ? { href: homeFor(actor), label: 'Go to your work' }
    : { href: '/sign-in', label: 'Sign in' };
  return (
    <>
      <SkipLink />
      <Header home="/">
        <ThemeSwitch initial={theme} />
        <LinkButton href={entry.href} size="sm" variant="primary">
          {entry.label}
        </LinkButton>
      </Header>
      <main id="main" className="mx-auto grid max-w-6xl gap-x-14 gap-y-10 px-4 py-10 sm:px-6 lg:grid-cols-[5fr_6fr] lg:py-14">
        <FrontText entry={entry} />
        <FoldExample />
        <div id="quick-check" tabIndex={-1} className="scroll-mt-4 lg:col-span-2">
          <QuickCheck />
        </div>
      </main>
    </>
  );
}
