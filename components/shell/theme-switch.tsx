'use client';

import * as Menu from '@radix-ui/react-dropdown-menu';
import { useState } from 'react';
import { buttonClass } from '@/components/ui/button';
import { ChevronDownIcon } from '@/components/ui/icons';
import { menuPanelClass } from './menu-style';
import { THEME_LABELS, type Theme } from './theme';
import { ThemeItems } from './theme-items';

/** Two halves of one face: day and dark. */
function ThemeIcon() {
  return (
    <svg viewBox="0 0 16 16" aria-hidden="true" className="size-4 flex-none">
      <circle cx="8" cy="8" r="6.25" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <path d="M8 1.75 A6.25 6.25 0 0 1 8 14.25 Z" fill="currentColor" />
    </svg>
  );
}

export function ThemeSwitch({ initial }: { initial: Theme }) {
  const [theme, setTheme] = useState(initial);
  return (
    <Menu.Root modal={false}>
      <Menu.Trigger className={buttonClass('quiet', 'sm', 'border border-line font-medium text-ink-soft')}>
        <ThemeIcon />
        <span className="sr-only">Theme: </span>
        <span>{THEME_LABELS[theme]}</span>
        <ChevronDownIcon className="size-3" />
      </Menu.Trigger>
      <Menu.Portal>
        <Menu.Content align="end" sideOffset={6} collisionPadding={8} className={menuPanelClass}>
          <ThemeItems theme={theme} onChoose={setTheme} />
        </Menu.Content>
      </Menu.Portal>
    </Menu.Root>
  );
}
