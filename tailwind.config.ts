import type { Config } from 'tailwindcss';

/**
 * Names for the tokens of app/globals.css. The palette is replaced, not extended, so that no colour outside the
 * tokens (a green, a second red) can be written by accident.
 */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      cloth: 'var(--cloth)',
      paper: 'var(--paper)',
      sunk: 'var(--sunk)',
      ink: 'var(--ink)',
      'ink-soft': 'var(--ink-soft)',
      line: 'var(--line)',
      'line-strong': 'var(--line-strong)',
      indigo: 'var(--indigo)',
      'indigo-deep': 'var(--indigo-deep)',
      'on-indigo': 'var(--on-indigo)',
      wash: 'var(--wash)',
      unlit: 'var(--unlit)',
      thread: 'var(--thread)',
      'thread-wash': 'var(--thread-wash)',
      ochre: 'var(--ochre)',
      'ochre-wash': 'var(--ochre-wash)',
      'tissue-fat': 'var(--tissue-fat)',
      'tissue-lean': 'var(--tissue-lean)',
      'tissue-organ': 'var(--tissue-organ)',
      'tissue-gland': 'var(--tissue-gland)',
      'tissue-vessel': 'var(--tissue-vessel)',
      'tissue-bone': 'var(--tissue-bone)',
    },
    fontFamily: {
      sans: 'var(--family-text)',
      mono: 'var(--family-figures)',
    },
    // 1.2 scale about a 16 px body. The smallest step is 13.3 px: nothing is set below 13.
    fontSize: {
      sm: ['0.8333rem', { lineHeight: '1.4' }],
      base: ['1rem', { lineHeight: '1.5' }],
      lg: ['1.2rem', { lineHeight: '1.4' }],
      xl: ['1.44rem', { lineHeight: '1.3' }],
      '2xl': ['1.728rem', { lineHeight: '1.25' }],
      '3xl': ['2.0736rem', { lineHeight: '1.2' }],
      '4xl': ['2.4883rem', { lineHeight: '1.15' }],
      '5xl': ['2.986rem', { lineHeight: '1.1' }],
    },
    borderRadius: {
      none: '0',
      sm: '3px',
      DEFAULT: '4px',
      md: '6px',
      lg: '8px',
      full: '9999px',
    },
  },
};

export default config;
