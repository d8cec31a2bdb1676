import js from '@eslint/js';
import astro from 'eslint-plugin-astro';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import tseslint from 'typescript-eslint';

/** The house's import directions (DEVELOPERS.md): which rooms a room may not know. */
const rooms = (files, forbidden, extra = []) => ({
  files,
  rules: {
    'no-restricted-imports': [
      'error',
      {
        patterns: [
          {
            group: forbidden.flatMap((room) => [`#${room}/*`, `#${room}/**`, `**/src/${room}/**`]),
            message: 'The house forbids this import direction: see DEVELOPERS.md.',
          },
          ...extra,
        ],
      },
    ],
  },
});
const nodeModules = { group: ['node:*'], message: 'This room knows no Node module.' };

export default tseslint.config(
  {
    ignores: [
      'dist/',
      '.astro/',
      '.data/',
      'node_modules/',
      'public/',
      'migrations/',
      'test-results/',
      'playwright-report/',
    ],
  },
  js.configs.recommended,
  ...tseslint.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    languageOptions: { parserOptions: { projectService: true } },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/consistent-type-imports': 'error',
      // Leaving a key out of an object is done by naming it beside the rest.
      '@typescript-eslint/no-unused-vars': ['error', { ignoreRestSiblings: true }],
    },
  },
  { files: ['**/*.tsx'], ...jsxA11y.flatConfigs.recommended, plugins: {} },
  {
    // A table that scrolls inside its place is a region the keyboard must reach.
    files: ['**/*.tsx'],
    rules: {
      'jsx-a11y/no-noninteractive-tabindex': [
        'error',
        { tags: [], roles: ['tabpanel', 'region'], allowExpressionValues: true },
      ],
    },
  },
  { files: ['src/components/**/*.tsx'], ...reactHooks.configs.flat.recommended },
  ...astro.configs['flat/recommended'],
  ...astro.configs['flat/jsx-a11y-recommended'],
  rooms(
    ['src/core/**'],
    ['contract', 'db', 'server', 'worker', 'components', 'layouts', 'pages', 'seed', 'scripts'],
    [nodeModules],
  ),
  rooms(['src/contract/**'], ['db', 'server', 'worker', 'components', 'layouts', 'pages'], [nodeModules]),
  rooms(['src/db/**'], ['server', 'worker', 'components', 'layouts', 'pages']),
  rooms(['src/server/**'], ['components', 'layouts', 'pages']),
  rooms(['src/worker/**'], ['components', 'layouts', 'pages']),
  rooms(['src/components/**'], ['db', 'server', 'worker', 'pages', 'layouts'], [nodeModules]),
  rooms(['src/layouts/**'], ['db', 'worker', 'pages']),
  rooms(['src/pages/**'], ['db', 'worker', 'core']),
  { languageOptions: { globals: { ...globals.node, ...globals.browser } } },
);
