import js from '@eslint/js'
import globals from 'globals'
import vue from 'eslint-plugin-vue'
import tseslint from 'typescript-eslint'
import prettier from 'eslint-config-prettier'

/** HTML must never be built from strings: names of wells and people come from users. */
const htmlStrings = [
  { selector: "MemberExpression[property.name='innerHTML']", message: 'Build elements, not HTML strings.' },
  {
    selector:
      'CallExpression[callee.property.name=/^(bindPopup|bindTooltip|setContent)$/] > :matches(Literal, TemplateLiteral).arguments',
    message: 'Leaflet reads a string as HTML: pass an element.',
  },
]

export default tseslint.config(
  {
    ignores: [
      'dist',
      '.data',
      '.cache',
      'drizzle',
      'tiles/light',
      'tiles/dark',
      'coverage',
      'test-results',
      'tests/reference',
    ],
  },
  js.configs.recommended,
  ...tseslint.configs.recommended,
  ...vue.configs['flat/recommended'],
  prettier,
  {
    files: ['**/*.{ts,vue,mjs,js}'],
    languageOptions: { globals: { ...globals.node, ...globals.browser } },
    rules: {
      'no-restricted-syntax': ['error', ...htmlStrings],
      'vue/no-v-html': 'error',
      'no-console': 'error',
      'no-undef': 'off',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  { files: ['**/*.vue'], languageOptions: { parserOptions: { parser: tseslint.parser } } },
  {
    files: ['server/setup/**', 'tests/bench/**', 'tests/reference/**', 'tests/support/**'],
    rules: { 'no-console': 'off' },
  },
)
