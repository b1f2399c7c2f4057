'use client';

import * as Menu from '@radix-ui/react-dropdown-menu';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { buttonClass } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import { MenuIcon } from '@/components/ui/icons';
import { menuItemClass, menuPanelClass } from './menu-style';
import { isCurrent, type NavigationItem } from './navigation';

/** A row of links; on a phone the same links behind one button. */
export function MainNavigation({ items }: { items: readonly NavigationItem[] }) {
  const path = usePathname();
  return (
    <>
      <nav aria-label="Main" className="hidden h-full sm:block">
        <ul className="flex h-full gap-1">
          {items.map((item) => {
            const current = isCurrent(item.href, path);
            return (
              <li key={item.href} className="h-full">
                <Link
                  href={item.href}
                  aria-current={current ? 'page' : undefined}
                  className={cx(
                    'flex h-full items-center border-b-2 px-2.5 pt-0.5',
                    current
                      ? 'border-ink font-semibold text-ink'
                      : 'border-transparent text-ink-soft hover:border-line-strong hover:text-ink',
                  )}
                >
                  {item.label}
                </Link>
              </li>
            );
          })}
        </ul>
      </nav>
      <div className="sm:hidden">
        <Menu.Root modal={false}>
          <Menu.Trigger className={buttonClass('quiet', 'sm', 'text-ink')}>
            <MenuIcon />
            Menu
          </Menu.Trigger>
          <Menu.Portal>
            <Menu.Content align="start" sideOffset={6} collisionPadding={8} className={menuPanelClass}>
              {items.map((item) => (
                <Menu.Item key={item.href} asChild className={menuItemClass}>
                  <Link href={item.href} aria-current={isCurrent(item.href, path) ? 'page' : undefined}>
                    {item.label}
                  </Link>
                </Menu.Item>
              ))}
            </Menu.Content>
          </Menu.Portal>
        </Menu.Root>
      </div>
    </>
  );
}
