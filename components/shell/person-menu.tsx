'use client';

import * as Menu from '@radix-ui/react-dropdown-menu';
import { signOut } from 'next-auth/react';
import Link from 'next/link';
import { useState } from 'react';
import { buttonClass } from '@/components/ui/button';
import { ChevronDownIcon } from '@/components/ui/icons';
import { useStatus } from '@/components/ui/status';
import type { ActionResult } from '@/lib/schemas/action-result';
import { menuItemClass, menuPanelClass } from './menu-style';
import type { Theme } from './theme';
import { ThemeItems } from './theme-items';

export interface PersonMenuProps {
  name: string;
  roles: string;
  siteName: string;
  theme: Theme;
  signOutEverywhere: () => Promise<ActionResult<unknown>>;
}

/** Unsaved edits of the bench live in sessionStorage; they end with the session. */
async function leave(): Promise<void> {
  sessionStorage.clear();
  await signOut({ callbackUrl: '/' });
}

const NOT_LEFT = 'You are still signed in: the server did not answer. Try again shortly.';

export function PersonMenu({ name, roles, siteName, theme: initial, signOutEverywhere }: PersonMenuProps) {
  const [leaving, setLeaving] = useState(false);
  const [theme, setTheme] = useState(initial);
  const { say } = useStatus();

  const attempt = async (work: () => Promise<void>) => {
    setLeaving(true);
    try {
      await work();
    } catch {
      say(NOT_LEFT);
      setLeaving(false);
    }
  };
  const leaveEverywhere = async () => {
    const result = await signOutEverywhere();
    if (!result.ok) {
      say(result.error.message);
      setLeaving(false);
      return;
    }
    await leave();
  };

  return (
    <Menu.Root modal={false}>
      <Menu.Trigger
        disabled={leaving}
        aria-label={`${name}, your account`}
        className={buttonClass('quiet', 'sm', 'max-w-44 min-w-0 font-medium text-ink-soft lg:max-w-72')}
      >
        <span className="truncate">
          {name}
          <span className="hidden lg:inline"> · {roles}</span>
        </span>
        <ChevronDownIcon className="size-3" />
      </Menu.Trigger>
      <Menu.Portal>
        <Menu.Content
          align="end"
          sideOffset={6}
          collisionPadding={8}
          className={`${menuPanelClass} max-w-72`}
        >
          <Menu.Label className="px-3 py-2 text-sm text-ink-soft">
            <span className="block text-base font-semibold text-ink">{name}</span>
            <span className="block">{roles}</span>
            <span className="block">{siteName}</span>
          </Menu.Label>
          <Menu.Separator className="my-1 h-px bg-line" />
          <div className="md:hidden">
            <ThemeItems theme={theme} onChoose={setTheme} />
            <Menu.Separator className="my-1 h-px bg-line" />
          </div>
          <Menu.Item asChild className={menuItemClass}>
            <Link href="/account">Your account</Link>
          </Menu.Item>
          <Menu.Item className={menuItemClass} onSelect={() => void attempt(leave)}>
            Sign out
          </Menu.Item>
          <Menu.Item className={menuItemClass} onSelect={() => void attempt(leaveEverywhere)}>
            Sign out everywhere
          </Menu.Item>
        </Menu.Content>
      </Menu.Portal>
    </Menu.Root>
  );
}
