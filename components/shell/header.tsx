import Link from 'next/link';
import type { ReactNode } from 'react';
import { Logo } from '@/components/ui/logo';
import { MainNavigation } from './main-navigation';
import type { NavigationItem } from './navigation';

/** The strip at the top of every page. */
export function Header({
  home,
  items,
  children,
}: {
  home: string;
  items?: readonly NavigationItem[];
  children?: ReactNode;
}) {
  return (
    <header className="border-b border-line bg-paper print:hidden">
      <div className="flex h-14 items-center gap-x-4 px-4 sm:px-5 lg:gap-x-8">
        <Link href={home} className="flex items-center gap-3 rounded text-ink">
          <Logo className="size-7" />
          <span className="text-lg font-bold tracking-tight max-sm:sr-only">Selvedge</span>
        </Link>
        {items && <MainNavigation items={items} />}
        <div className="ml-auto flex min-w-0 items-center gap-1 sm:gap-2">{children}</div>
      </div>
    </header>
  );
}
