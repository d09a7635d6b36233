import eslint from '@eslint/js';
import angular from 'angular-eslint';
import tseslint from 'typescript-eslint';

/** Imports point one way: web → shared → compliance; server → shared, compliance, drizzle; compliance knows nobody. */
const forbid = (rooms, extra = []) => ({
  'no-restricted-imports': [
    'error',
    {
      patterns: [
        ...rooms.flatMap((room) => [
          { group: [`#${room}`, `#${room}/*`, `**/${room}/**`], message: `This room may not import ${room}/ (see DEVELOPERS.md, "The house").` },
        ]),
        ...extra,
      ],
    },
  ],
});
const noIo = {
  group: ['node:*', 'fs', 'path', 'crypto', 'zod', 'zod/*', 'express', 'pg', 'drizzle-orm', 'drizzle-orm/*', '@angular/*', 'rxjs', 'date-holidays'],
  message: 'compliance/ is pure: no I/O, no framework, no zod.',
};

export default tseslint.config(
  { ignores: ['dist/', '.data/', '.angular/', 'node_modules/', 'coverage/', '.shots/'] },
  eslint.configs.recommended,
  { files: ['**/*.mjs'], languageOptions: { globals: { process: 'readonly', console: 'readonly', URL: 'readonly', Buffer: 'readonly', setTimeout: 'readonly', clearTimeout: 'readonly', setInterval: 'readonly', clearInterval: 'readonly', fetch: 'readonly', AbortSignal: 'readonly' } } },
  {
    files: ['**/*.ts'],
    extends: [...tseslint.configs.recommended],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports', disallowTypeAnnotations: false }],
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-console': ['error', { allow: ['warn', 'error'] }],
    },
  },
  {
    files: ['compliance/**/*.ts'],
    ignores: ['compliance/**/*.spec.ts'],
    rules: {
      ...forbid(['shared', 'server', 'drizzle', 'web', 'ui'], [noIo]),
      'no-restricted-globals': ['error', 'process', 'fetch', 'window', 'document'],
      'no-restricted-properties': ['error', { object: 'Date', property: 'now', message: 'The clock comes in as asOf.' }, { object: 'Math', property: 'random' }],
      'no-restricted-syntax': ['error', { selector: "NewExpression[callee.name='Date'][arguments.length=0]", message: 'The clock comes in as asOf.' }],
    },
  },
  { files: ['shared/**/*.ts'], rules: forbid(['server', 'drizzle', 'web', 'ui']) },
  { files: ['drizzle/**/*.ts'], rules: forbid(['server', 'web', 'ui']) },
  { files: ['server/**/*.ts'], rules: forbid(['web', 'ui']) },
  { files: ['server/cli/**/*.ts', 'server/local/**', 'test/bench/**', 'server/recordlog/verify.mjs'], rules: { 'no-console': 'off' } },
  {
    files: ['web/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      ...forbid(['server', 'drizzle']),
      '@angular-eslint/component-selector': ['error', { type: 'element', prefix: 'kb', style: 'kebab-case' }],
      '@angular-eslint/directive-selector': ['error', { type: 'attribute', prefix: 'kb', style: 'camelCase' }],
      '@angular-eslint/prefer-signals': 'error',
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/prefer-output-emitter-ref': 'error',
      '@angular-eslint/prefer-host-metadata-property': 'error',
    },
  },
  { files: ['web/**/*.html'], extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility] },
);
