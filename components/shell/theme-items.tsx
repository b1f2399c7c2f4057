'use client';

import * as Menu from '@radix-ui/react-dropdown-menu';
import { menuItemClass } from './menu-style';
import { parseTheme, THEME_COOKIE, THEME_LABELS, THEMES, type Theme } from './theme';

const YEAR_S = 365 * 24 * 60 * 60;

/** The cookie lets the server render the same theme next time, so nothing flashes. */
export function applyTheme(theme: Theme): void {
  if (theme === 'system') {
    document.cookie = `${THEME_COOKIE}=; path=/; max-age=0; samesite=lax`;
    delete document.documentElement.dataset.theme;
  } else {
    document.cookie = `${THEME_COOKIE}=${theme}; path=/; max-age=${YEAR_S}; samesite=lax`;
    document.documentElement.dataset.theme = theme;
  }
}

/** The three themes as items of a menu. */
export function ThemeItems({ theme, onChoose }: { theme: Theme; onChoose: (theme: Theme) => void }) {
  return (
    <Menu.RadioGroup
      value={theme}
      onValueChange={(value) => {
        const next = parseTheme(value);
        applyTheme(next);
        onChoose(next);
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
  );
}
