import next from 'eslint-config-next/core-web-vitals';
import typescript from 'eslint-config-next/typescript';
import { importRules } from './tests/structure/import-rules.mjs';

const base = (glob) => glob.replace(/\/\*\*.*$/, '');
const under = (inner, outer) =>
  inner.files.every((file) => outer.files.some((other) => `${base(file)}/`.startsWith(`${base(other)}/`)));

/** Patterns of one rule, as gitignore lines: what is allowed again comes after what forbids it. */
function patternsOf({ never, allow = [], packages = [], why }) {
  const group = [
    ...never.flatMap((folder) => [`@/${folder}`, `@/${folder}/**`]),
    ...packages.flatMap((name) => [name, `${name}/*`]),
    ...allow.flatMap((path) => [`!@/${path}`, `!@/${path}/**`]),
  ];
  return group.length > 0 ? [{ group, message: why }] : [];
}

// The last matching entry replaces earlier ones, so each repeats the rules of the folders that hold it.
const importBans = importRules.map((rule, index) => ({
  files: rule.files,
  ignores: rule.except ?? [],
  rules: {
    'no-restricted-imports': [
      'error',
      { patterns: importRules.filter((other, at) => at <= index && under(rule, other)).flatMap(patternsOf) },
    ],
  },
}));

const config = [
  { ignores: ['.next/**', '.next-*/**', '.data/**', 'coverage/**', 'test-results/**', 'playwright-report/**', 'next-env.d.ts', 'db/types/tables.ts'] },
  ...next,
  ...typescript,
  {
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-explicit-any': ['error'],
      // Only CommonJS has a variable of that name to protect.
      '@next/next/no-assign-module-variable': 'off',
      eqeqeq: ['error', 'always'],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'], location: 'anywhere' }],
      'max-lines': ['error', { max: 500 }],
    },
  },
  ...importBans,
  {
    files: ['app/**/*.tsx', 'components/**/*.tsx'],
    // What paints a PDF is no page: there `style` is the PDF library's own word.
    ignores: ['components/**/pdf/**'],
    rules: {
      'no-restricted-syntax': [
        'error',
        {
          selector: 'JSXAttribute[name.name="style"]',
          message: 'The page policy refuses style attributes: use a class, an SVG attribute or the CSSOM.',
        },
        {
          selector: 'Literal[value=/#([0-9a-fA-F]{3,4}|[0-9a-fA-F]{6}|[0-9a-fA-F]{8})(?![0-9A-Za-z_-])/]',
          message: 'Colours come from the tokens in app/globals.css, never from a hex value.',
        },
        {
          selector: 'TemplateElement[value.raw=/#([0-9a-fA-F]{3,4}|[0-9a-fA-F]{6}|[0-9a-fA-F]{8})(?![0-9A-Za-z_-])/]',
          message: 'Colours come from the tokens in app/globals.css, never from a hex value.',
        },
      ],
    },
  },
];

export default config;
