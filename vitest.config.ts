import { fileURLToPath } from 'node:url';
import { quasar, transformAssetUrls } from '@quasar/vite-plugin';
import vue from '@vitejs/plugin-vue';
import { defineConfig } from 'vitest/config';

const src = fileURLToPath(new URL('./src', import.meta.url));

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'shared',
          environment: 'node',
          include: ['tests/shared/**/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/support/globalSetup.ts'],
          setupFiles: ['tests/support/serverSetup.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        plugins: [
          vue({ template: { transformAssetUrls } }),
          quasar({ autoImportComponentCase: 'pascal' }),
        ],
        resolve: { alias: { src } },
        test: {
          name: 'src',
          environment: 'happy-dom',
          include: ['tests/src/**/*.test.ts'],
          setupFiles: ['tests/support/mountQuasar.ts'],
          testTimeout: 15_000,
        },
      },
      {
        test: {
          name: 'launcher',
          environment: 'node',
          include: ['tests/launcher/**/*.test.ts'],
          testTimeout: 180_000,
          hookTimeout: 180_000,
        },
      },
      {
        test: {
          name: 'e2e',
          environment: 'node',
          include: ['tests/e2e/**/*.test.ts'],
          fileParallelism: false,
          testTimeout: 300_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
});
