import withNuxt from './.nuxt/eslint.config.mjs'

/** Imports run one way: app -> shared <- server; within shared: trade <- lesson <- bench <- judging. */
// A pattern that begins with # would be read as a comment, so the aliases are told as regular expressions.
const never = (...groups) => ({
  'no-restricted-imports': ['error', {
    patterns: groups.flatMap(([group, message]) => [
      { group: group.filter(one => !one.startsWith('#')), message },
      ...group.filter(one => one.startsWith('#')).map(one => ({ regex: `^${one.replace('*', '.*')}`, message })),
    ]),
  }],
})
const FRAMEWORK = [['vue', 'vue-router', 'pinia', '@vueuse/*', 'nuxt', 'nuxt/*', '#app', '#app/*', '#imports', 'h3', 'nitropack', 'drizzle-orm', 'drizzle-orm/*', 'mysql2', 'mysql2/*', 'node:*'], 'shared/ is plain TypeScript: no framework, no database, no Node.']
const OUT = [['#server/*', '~/*', '@/*', '**/server/**', '**/app/**'], 'shared/ imports neither app nor server.']
const up = (...areas) => [areas.flatMap(area => [`**/${area}/*`, `#shared/${area}/*`]), 'Within shared imports run one way: trade <- lesson <- bench <- judging.']

const SYNTAX = [
  { selector: 'MemberExpression[object.name="sql"][property.name="raw"]', message: 'SQL is never put together from text.' },
  { selector: 'MemberExpression[object.name=/^(db|tx)$/][property.name="query"]', message: 'Relational queries do not work on this database. Write a select with joins.' },
]
/** The same for what is imported while running. */
const neverLater = (pattern, message) => ({ 'no-restricted-syntax': ['error', ...SYNTAX, { selector: `ImportExpression${pattern}`, message }] })

export default withNuxt(
  { ignores: ['drizzle/**', 'content-src/**', '.output*/**', '.nuxt*/**', '.data*/**'] },
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrors: 'none', ignoreRestSiblings: true }],
      '@typescript-eslint/unified-signatures': 'off',
      'vue/multi-word-component-names': 'off',
      'vue/html-self-closing': 'off',
      'vue/no-v-html': 'error',
      'vue/no-multiple-template-root': 'off',
      'no-restricted-syntax': ['error', ...SYNTAX],
    },
  },
  { files: ['app/**'], rules: { ...never([['#server/*', '**/server/**'], 'The application never imports the server.']), ...neverLater('[source.value=/(^#server|(^|\\u002F)server\\u002F)/]', 'The application never imports the server.') } },
  { files: ['server/**'], rules: { ...never([['~/*', '@/*', '**/app/**'], 'The server never imports the application.']), ...neverLater('[source.value=/(^[~@]\\u002F|(^|\\u002F)app\\u002F)/]', 'The server never imports the application.') } },
  { files: ['shared/**'], rules: neverLater('', 'shared/ is there at once, and imports nothing while it runs.') },
  { files: ['shared/**'], rules: never(FRAMEWORK, OUT) },
  { files: ['shared/trade/**'], rules: never(FRAMEWORK, OUT, up('lesson', 'bench', 'judging')) },
  { files: ['shared/lesson/**'], rules: never(FRAMEWORK, OUT, up('bench', 'judging')) },
  { files: ['shared/bench/**'], rules: never(FRAMEWORK, OUT, up('judging')) },
)
