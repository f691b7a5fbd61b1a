import js from '@eslint/js';
import astro from 'eslint-plugin-astro';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import { defineConfig, globalIgnores } from 'eslint/config';
import tseslint from 'typescript-eslint';

// What the framework's version in use cannot be trusted with, and what the content security policy forbids.
const refused = [
  {
    selector: 'JSXAttribute[name.name="define:vars"]',
    message: 'define:vars does not escape </script>: pass data in an attribute.',
  },
  {
    selector: 'JSXAttribute[name.name="server:defer"]',
    message: 'Server islands are switched off: their route has no body limit.',
  },
  {
    selector: 'JSXAttribute[name.name="dangerouslySetInnerHTML"]',
    message: 'HTML goes through the sanitiser of src/lessons only.',
  },
];

export default defineConfig(
  globalIgnores(['dist', '.astro', '.data', 'node_modules', 'test-results', 'playwright-report']),
  js.configs.recommended,
  tseslint.configs.recommended,
  astro.configs['flat/recommended'],
  astro.configs['flat/jsx-a11y-recommended'],
  // The plugin itself is registered by the Astro configuration above.
  { files: ['**/*.tsx'], rules: jsxA11y.flatConfigs.recommended.rules },
  { files: ['src/**/*.{ts,tsx}'], ...reactHooks.configs.flat['recommended-latest'] },
  {
    files: ['src/**/*.{ts,tsx}'],
    rules: {
      // Written for the React Compiler, which is not used here; they refuse framer-motion's and dnd-kit's own way
      // of moving a node outside React's rendering.
      'react-hooks/immutability': 'off',
      'react-hooks/refs': 'off',
    },
  },
  {
    rules: {
      'no-console': 'error',
      'no-eval': 'error',
      'no-implied-eval': 'error',
      'no-new-func': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'no-restricted-syntax': ['error', ...refused],
      // TypeScript itself reports names that do not exist.
      'no-undef': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      // `void promise` says that nobody waits for it; `interface Props {}` names a component without properties.
      '@typescript-eslint/no-empty-object-type': ['error', { allowInterfaces: 'always' }],
    },
  },
  {
    // Programs of the command line speak on standard output.
    files: ['scripts/**', 'tests/speed/**', 'tests/setup/console.ts'],
    rules: { 'no-console': 'off' },
  },
  { files: ['.dependency-cruiser.cjs'], rules: { '@typescript-eslint/no-require-imports': 'off' } },
);
