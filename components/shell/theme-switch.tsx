'use client';

import * as Menu from '@radix-ui/react-dropdown-menu';
import { useState } from 'react';
import { buttonClass } from '@/components/ui/button';
import { ChevronDownIcon } from '@/components/ui/icons';
import { menuItemClass, menuPanelClass } from './menu-style';
import { parseTheme, THEME_COOKIE, THEME_LABELS, THEMES, type Theme } from './theme';

const YEAR_S = 365 * 24 * 60 * 60;

/** The cookie lets the server render the same theme next time, so nothing flashes. */
function setTheme(theme: Theme): void {
  if (theme === 'system') {
    document.cookie = `${THEME_COOKIE}=; path=/; max-age=0; samesite=lax`;
    delete document.documentElement.dataset.theme;
  } else {
    document.cookie = `${THEME_COOKIE}=${theme}; path=/; max-age=${YEAR_S}; samesite=lax`;
    document.documentElement.dataset.theme = theme;
  }
}

function ThemeIcon() {
  return (
    <svg viewBox="0 0 16 16" aria-hidden="true" className="size-4 flex-none">
      <circle cx="8" cy="8" r="6.25" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <path d="M8 1.75 A6.25 6.25 0 0 1 8 14.25 Z" fill="currentColor" />
    </svg>
  );
}

export function ThemeSwitch({ initial }: { initial: Theme }) {
  const [theme, setOwn] = useState(initial);
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
          <Menu.RadioGroup
            value={theme}
            onValueChange={(value) => {
              const next = value === 'system' ? 'system' : parseTheme(value);
              setOwn(next);
              setTheme(next);
            }}
          >
            {THEMES.map((option) => (
              <Menu.RadioItem key={option} value={option} className={menuItemClass}>
                <span className="flex-1">{THEME_LABELS[option]}</span>
                <Menu.ItemIndicator>
                  <svg viewBox="0 0 16 16" aria-hidden="true" className="size-4">
                    <path d="M3 8.5 6.5 12 13 4.5" fill="none" stroke="currentColor" strokeWidth="1.75" />
                  </svg>
                </Menu.ItemIndicator>
              </Menu.RadioItem>
            ))}
          </Menu.RadioGroup>
        </Menu.Content>
      </Menu.Portal>
    </Menu.Root>
  );
}
