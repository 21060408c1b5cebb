import pluginVue from 'eslint-plugin-vue'
import tseslint from 'typescript-eslint'

const wall = (files, ...patterns) => ({ files, rules: { 'no-restricted-imports': ['error', { patterns }] } })
const server = { group: ['**/server/**'], message: 'src/ never imports server/: ask over HTTP through src/api, or put what both need into shared/.' }
const client = { group: ['**/src/**'], message: 'server/ never imports src/: put what both need into shared/.' }

export default tseslint.config(
  { ignores: ['.build/', '.data/', 'node_modules/'] },
  ...tseslint.configs.recommended,
  ...pluginVue.configs['flat/essential'],
  { files: ['**/*.vue'], languageOptions: { parserOptions: { parser: tseslint.parser } } },
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'vue/multi-word-component-names': 'off',
      'no-console': 'off',
      eqeqeq: 'error',
      'prefer-const': 'error',
    },
  },
  wall(['shared/**'], {
    group: ['**/server/**', '**/src/**', 'node:*', 'vue', 'express', 'typeorm'],
    message: 'shared/ is pure: pass the value in as an argument.',
  }),
  wall(['src/**'], server),
  wall(['src/components/**'], server, { group: ['**/stores/**', '**/api/*.api', '**/offline/**'], message: 'A component takes props and sends events; stores and HTTP belong to views, composables and stores.' }),
  wall(['server/**'], client),
  wall(['server/modules/**/*.service.ts'], client, { group: ['express'], message: 'A service knows no HTTP: that is what routes are for.' }),
  wall(['migrations/**'], { group: ['**/server/**', '**/src/**', '**/shared/**'], message: 'A migration is plain SQL and never changes with the code.' }),
)
