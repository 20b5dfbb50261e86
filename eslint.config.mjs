import withNuxt from './.nuxt/eslint.config.mjs'

export default withNuxt(
  { ignores: ['public/', 'drizzle/', 'test-results/', 'playwright-report/'] },
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'vue/multi-word-component-names': 'off',
      'vue/no-v-html': 'error',
    },
  },
  { files: ['app/**', 'shared/**'], rules: { 'no-console': 'error' } },
  {
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-syntax': ['error', {
        selector: 'Program > VariableDeclaration[kind="let"], Program > ExportNamedDeclaration > VariableDeclaration[kind="let"]',
        message: 'shared/ keeps no state: pass it in.',
      }],
      'no-restricted-properties': ['error',
        { object: 'Math', property: 'random', message: 'Pass a seed in.' },
        { object: 'Date', property: 'now', message: 'Pass the time in.' },
      ],
    },
  },
)
