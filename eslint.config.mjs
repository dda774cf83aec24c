import { createTypeScriptImportResolver } from 'eslint-import-resolver-typescript';
import importX from 'eslint-plugin-import-x';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

// Direction: baseline <- control <- scoring <- data <- api, worker. contracts imports nothing of ours.
const ALL_LIBS = ['baseline', 'control', 'scoring', 'workbook', 'contracts', 'data', 'mail', 'platform'];
const FRAMEWORKS = ['@nestjs/*', 'react', 'react-*', 'bull', 'ioredis', 'ioredis-mock', 'express'];
const SQL = ['knex', 'pg', 'pg-copy-streams'];

/** Forbids, below `files`, every lib of ours that is not in `allowed`, and the given outside packages. */
function layer(files, allowed, outside, { isPure = false } = {}) {
  const group = [...ALL_LIBS.filter((lib) => !allowed.includes(lib)).map((lib) => `@app/${lib}`), ...outside];
  return {
    files,
    rules: {
      'no-restricted-imports': [
        'error',
        { patterns: [{ group, message: 'This layer may not import that (see DEVELOPERS.md, Layers).' }] },
      ],
      ...(isPure && {
        'no-restricted-properties': [
          'error',
          { object: 'process', property: 'env', message: 'A pure lib takes its settings as arguments.' },
          { object: 'Date', property: 'now', message: 'A pure lib takes the time as an argument.' },
          { object: 'Math', property: 'random', message: 'A pure lib takes randomness as an argument.' },
        ],
      }),
    },
  };
}

export default tseslint.config(
  { ignores: ['dist/**', 'node_modules/**', '.data/**', 'coverage/**', 'fixtures/**'] },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    plugins: { 'import-x': importX },
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    settings: {
      'import-x/resolver-next': [
        createTypeScriptImportResolver({ project: ['tsconfig.json', 'apps/web/tsconfig.json'] }),
      ],
    },
    rules: {
      'import-x/no-cycle': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'no-console': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
    },
  },
  layer(['libs/baseline/**'], ['baseline'], [...FRAMEWORKS, ...SQL, 'exceljs', 'nodemailer'], { isPure: true }),
  layer(['libs/control/**'], ['baseline', 'control'], [...FRAMEWORKS, ...SQL, 'exceljs', 'nodemailer'], {
    isPure: true,
  }),
  layer(['libs/scoring/**'], ['baseline', 'control', 'scoring'], [...FRAMEWORKS, ...SQL, 'exceljs', 'nodemailer'], {
    isPure: true,
  }),
  layer(['libs/workbook/**'], ['workbook', 'contracts'], [...FRAMEWORKS, ...SQL, 'nodemailer'], { isPure: true }),
  layer(['libs/contracts/**'], ['contracts'], [...FRAMEWORKS, ...SQL, 'exceljs', 'nodemailer'], { isPure: true }),
  layer(['libs/mail/**'], ['mail', 'contracts'], [...FRAMEWORKS, ...SQL, 'exceljs']),
  layer(
    ['libs/data/**'],
    ['data', 'contracts', 'scoring', 'control', 'baseline'],
    [...FRAMEWORKS, 'exceljs', 'nodemailer'],
  ),
  layer(['libs/platform/**'], ['contracts', 'data', 'mail', 'platform'], ['exceljs']),
  layer(['apps/api/**', 'apps/worker/**', 'apps/mail-catcher/**'], ALL_LIBS, SQL),
  layer(['apps/web/**'], ['contracts', 'baseline', 'control'], [...SQL, '@nestjs/*', 'bull', 'exceljs', 'nodemailer']),
  {
    files: ['apps/web/**/*.{ts,tsx}'],
    plugins: { 'react-hooks': reactHooks },
    rules: reactHooks.configs.recommended.rules,
  },
  {
    files: ['**/*.spec.ts', 'test/**'],
    rules: {
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
    },
  },
);
