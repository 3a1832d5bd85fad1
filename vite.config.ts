import { defineConfig } from 'vitest/config';

export default defineConfig({
  root: 'src',
  test: { root: '.', include: ['test/**/*.test.ts'], exclude: ['test/browser/**', 'node_modules/**'] },
});
