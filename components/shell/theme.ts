/** `day` and `control-room` are set by a person; `system` follows the device and stores nothing. */
export const THEMES = ['system', 'day', 'control-room'] as const;
export type Theme = (typeof THEMES)[number];

export const THEME_COOKIE = 'selvedge-theme';

export const THEME_LABELS: Record<Theme, string> = {
  system: 'As this device',
  day: 'Day',
  'control-room': 'Control room',
};

/** Anything a cookie may hold → a theme; what is not ours follows the system. */
export function parseTheme(value: string | undefined): Theme {
  return value === 'day' || value === 'control-room' ? value : 'system';
}
