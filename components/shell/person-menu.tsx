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

export interface PersonMenuProps {
  name: string;
  roles: string;
  accountHref?: string;
  signOutEverywhere: () => Promise<ActionResult<unknown>>;
}

/** Unsaved edits of the bench live in sessionStorage; they end with the session. */
async function leave(): Promise<void> {
  sessionStorage.clear();
  await signOut({ callbackUrl: '/' });
}

export function PersonMenu({ name, roles, accountHref, signOutEverywhere }: PersonMenuProps) {
  const [leaving, setLeaving] = useState(false);
  const { say } = useStatus();

  const leaveEverywhere = async () => {
    setLeaving(true);
    try {
      const result = await signOutEverywhere();
      if (result.ok) return await leave();
      say(result.error.message);
    } catch {
      say('You are still signed in: the server did not answer. Try again shortly.');
    }
    setLeaving(false);
  };

  return (
    <Menu.Root modal={false}>
      <Menu.Trigger disabled={leaving} className={buttonClass('quiet', 'sm', 'max-w-full font-medium text-ink-soft')}>
        <span className="truncate">
          {name}
          <span className="hidden lg:inline"> · {roles}</span>
        </span>
        <ChevronDownIcon className="size-3" />
      </Menu.Trigger>
      <Menu.Portal>
        <Menu.Content align="end" sideOffset={6} collisionPadding={8} className={menuPanelClass}>
          <Menu.Label className="px-3 py-2 text-sm text-ink-soft">
            <span className="block font-semibold text-ink">{name}</span>
            {roles}
          </Menu.Label>
          <Menu.Separator className="my-1 h-px bg-line" />
          {accountHref && (
            <Menu.Item asChild className={menuItemClass}>
              <Link href={accountHref}>Your account</Link>
            </Menu.Item>
          )}
          <Menu.Item
            className={menuItemClass}
            onSelect={() => {
              setLeaving(true);
              void leave();
            }}
          >
            Sign out
          </Menu.Item>
          <Menu.Item className={menuItemClass} onSelect={() => void leaveEverywhere()}>
            Sign out everywhere
          </Menu.Item>
        </Menu.Content>
      </Menu.Portal>
    </Menu.Root>
  );
}
