import js from '@eslint/js'
import vue from 'eslint-plugin-vue'
import globals from 'globals'
import ts from 'typescript-eslint'

/** Who alone may import a package, so that each is known in one place. */
const onlyIn = (name, folders, message) => ({ name, folders, message })
const KEPT = [
  onlyIn('mathjs', ['shared/engine/'], 'mathjs is known in shared/engine only.'),
  onlyIn('katex', ['src/editor/katex.ts'], 'KaTeX is known in src/editor/katex.ts only.'),
  onlyIn(
    'typeorm',
    ['server/entities/', 'server/migrations/', 'server/repositories/', 'server/data-source.ts'],
    'TypeORM is known in entities, migrations, repositories and the data source only.',
  ),
  onlyIn(
    'express',
    ['server/app.ts', 'server/routes/', 'server/middleware/'],
    'Express is known in app, routes and middleware only.',
  ),
]

/** The packages refused in some files, from the table above. */
const packageRules = (files, allowed) => ({
  files,
  rules: {
    '@typescript-eslint/no-restricted-imports': [
      'error',
      {
        paths: KEPT.filter(({ name }) => !allowed.includes(name)).map(({ name, message }) => ({
          name,
          message,
        })),
        patterns: KEPT.filter(({ name }) => !allowed.includes(name)).map(({ name, message }) => ({
          group: [`${name}/*`, ...(name === 'katex' ? ['!katex/dist/*.css'] : [])],
          message,
        })),
      },
    ],
  },
})

export default ts.config(
  { ignores: ['dist/', 'node_modules/', '.data/', '.artefacts/', 'templates/'] },
  js.configs.recommended,
  ...ts.configs.strict,
  ...vue.configs['flat/recommended'],
  {
    files: ['**/*.vue'],
    languageOptions: { parserOptions: { parser: ts.parser } },
  },
  {
    languageOptions: { globals: { ...globals.node, ...globals.browser, ...globals.worker } },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      // Entities and errors are classes by their framework's convention; parameter properties are TypeScript's own.
      '@typescript-eslint/no-extraneous-class': 'off',
      '@typescript-eslint/no-useless-constructor': 'off',
      'no-console': 'off',
      'no-undef': 'off',
      eqeqeq: 'error',
      'vue/max-attributes-per-line': 'off',
      'vue/singleline-html-element-content-newline': 'off',
      'vue/html-self-closing': 'off',
      'vue/html-closing-bracket-newline': 'off',
      'vue/html-indent': 'off',
      'vue/multi-word-component-names': 'off',
      'vue/first-attribute-linebreak': 'off',
      'vue/multiline-html-element-content-newline': 'off',
    },
  },
  packageRules(['shared/**/*.ts', 'src/**/*.{ts,vue}', 'server/**/*.ts'], []),
  ...KEPT.map(({ name, folders }) =>
    packageRules(
      folders.map((folder) => (folder.endsWith('/') ? `${folder}**/*.{ts,vue}` : folder)),
      [name],
    ),
  ),
)
