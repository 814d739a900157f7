import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: { include: ['app/domain/**/*.test.ts'], environment: 'node' },
});
