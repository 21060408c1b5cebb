import pluginVue from 'eslint-plugin-vue'
import tseslint from 'typescript-eslint'

// Which way imports run. A file may match several blocks below and only the last one counts for a rule,
// so each block lists all of its walls.
const noServer = { group: ['**/server/**'], message: 'src/ never imports server/: ask over HTTP through src/api, or put what both need into shared/.' }
const noClient = { group: ['**/src/**'], message: 'server/ never imports src/: put what both need into shared/.' }
const noNode = { group: ['node:*', 'express', 'typeorm', 'pg', 'pino', 'nodemailer', 'pdfkit'], message: 'The browser has no such thing: that is for server/.' }
const noBrowser = { group: ['vue', 'vue-*', 'pinia', 'primevue/*', 'idb'], message: 'The server has no page: that is for src/.' }
const noHttp = { regex: '(^|/)(?<!shared/)api/(?!problem$)', message: 'HTTP is reached through stores and composables, which call src/api; only what a failure is may be known.' }
const noStores = { group: ['**/stores/**'], message: 'A component takes props and sends events; the view hands it what the store holds.' }
const noOffline = { group: ['**/offline/**'], message: 'The outbox is reached through composables and stores.' }
const noScreens = { group: ['**/views/**', '**/components/**'], message: 'Screens use this, not the other way round.' }
const noForeignRows = { regex: '^\\.\\./[^.][^/]*/[^/]+\\.repository$', message: "Another module's rows are its own: call that module's service." }
const noRepository = { group: ['**/*.repository', 'typeorm', 'pg'], message: 'A route knows no SQL: call the service.' }
const noExpress = { group: ['express', '**/*.routes', '**/middleware/**'], message: 'This knows no HTTP: that is what routes are for.' }

const walls = (files, ...patterns) => ({ files, rules: { 'no-restricted-imports': ['error', { patterns }] } })

const pure = 'shared/ is pure, so that phone and server give one answer: take it as an argument.'
const noAsk = ['fetch', 'XMLHttpRequest', 'EventSource'].map((name) => ({ name, message: 'Only src/api speaks HTTP.' }))
const noKeep = ['indexedDB'].map((name) => ({ name, message: 'Only src/offline keeps things on the device.' }))

export default tseslint.config(
  { ignores: ['.build/', '.data/', 'node_modules/'] },
  ...tseslint.configs.recommended,
  ...pluginVue.configs['flat/recommended'],
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  { files: ['**/*.vue'], languageOptions: { parserOptions: { parser: tseslint.parser } } },
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      'no-restricted-exports': ['error', { restrictDefaultExports: { direct: true } }],
      // of ESLint's own set those that find faults the compiler does not
      'no-control-regex': 'error',
      'no-empty': 'error',
      'no-empty-character-class': 'error',
      'no-fallthrough': 'error',
      'no-loss-of-precision': 'error',
      'no-misleading-character-class': 'error',
      'no-self-assign': 'error',
      'no-self-compare': 'error',
      'no-unreachable-loop': 'error',
      'no-unsafe-finally': 'error',
      'no-unsafe-optional-chaining': 'error',
      'no-useless-escape': 'error',
      'use-isnan': 'error',
      eqeqeq: 'error',
      'prefer-const': 'error',
      'no-var': 'error',
    },
  },
  {
    // Decorators read the types of constructors and fields when the program runs: such imports must stay.
    files: ['server/**'],
    rules: { '@typescript-eslint/consistent-type-imports': 'off' },
  },
  {
    // A promise that nobody waits for is a transaction that nobody sees fail. Needs types, so only where it counts.
    files: ['server/**/*.ts'],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
    },
  },
  {
    files: ['src/**'],
    rules: {
      'vue/multi-word-component-names': 'off',
      'vue/block-lang': ['error', { script: { lang: 'ts' } }],
      'vue/component-api-style': ['error', ['script-setup']],
      'vue/define-emits-declaration': 'error',
      'vue/define-props-declaration': 'error',
      'vue/no-bare-strings-in-template': ['error', { allowlist: ['·', ';', '–', '—', '/', '%', '(', ')', ':', ',', '.', '+', '×', '→', '=', '*'] }],
      'vue/require-default-prop': 'off', // TypeScript says which are optional
      // How lines are broken is left to whoever writes them.
      'vue/max-attributes-per-line': 'off',
      'vue/singleline-html-element-content-newline': 'off',
      'vue/multiline-html-element-content-newline': 'off',
      'vue/html-closing-bracket-newline': 'off',
      'vue/html-indent': 'off',
      'vue/html-self-closing': 'off',
      'no-restricted-globals': ['error', ...noAsk, ...noKeep],
    },
  },
  { files: ['src/**/*.vue', 'eslint.config.js', 'vite.config.ts', '**/*.d.ts'], rules: { 'no-restricted-exports': 'off' } },
  { files: ['src/api/**'], rules: { 'no-restricted-globals': ['error', ...noKeep] } },
  { files: ['src/offline/**'], rules: { 'no-restricted-globals': ['error', ...noAsk] } },

  walls(['shared/**'], {
    group: ['**/server/**', '**/src/**', 'node:*', 'vue', 'vue-*', 'pinia', 'express', 'typeorm', 'pg', 'class-validator', 'uuid'],
    message: pure,
  }),
  {
    files: ['shared/**'],
    rules: {
      'no-restricted-globals': ['error', ...['window', 'document', 'navigator', 'process', 'fetch', 'crypto', 'performance', 'setTimeout'].map((name) => ({ name, message: pure }))],
      'no-restricted-syntax': ['error',
        { selector: "CallExpression[callee.object.name='Date'][callee.property.name='now']", message: pure },
        { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: pure },
        { selector: "CallExpression[callee.object.name='Math'][callee.property.name='random']", message: pure },
      ],
    },
  },
  walls(['src/**'], noServer, noNode),
  walls(['src/components/**'], noServer, noNode, noStores, noHttp, noOffline),
  walls(['src/views/**'], noServer, noNode, noHttp, noOffline),
  walls(['src/composables/**', 'src/stores/**'], noServer, noNode, noScreens),
  walls(['src/api/**'], noServer, noNode, noScreens, noStores, noOffline),
  walls(['src/offline/**'], noServer, noNode, noScreens, noStores),
  walls(['server/**'], noClient, noBrowser),
  walls(['server/modules/**'], noClient, noBrowser, noForeignRows),
  walls(['server/modules/**/*.routes.ts'], noClient, noBrowser, noRepository),
  walls(['server/modules/**/*.service.ts'], noClient, noBrowser, noForeignRows, noExpress),
  walls(['server/modules/**/*.repository.ts'], noClient, noBrowser, noForeignRows, noExpress),
  walls(['migrations/**'], { group: ['**/server/**', '**/src/**', '**/shared/**'], message: 'A migration is plain SQL and never changes with the code.' }),
)
