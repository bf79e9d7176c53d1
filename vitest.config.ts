import { createRequire } from 'node:module';
import { defineConfig } from 'vitest/config';

const require = createRequire(import.meta.url);
const reactNativeWeb = [
  { find: /^react-native$/, replacement: 'react-native-web' },
  { find: /^react-native-svg$/, replacement: require.resolve('react-native-svg/lib/module/ReactNativeSVG.web.js') },
];
const webFirst = ['.web.tsx', '.web.ts', '.web.js', '.tsx', '.ts', '.js', '.mjs', '.json'];

export default defineConfig({
  test: {
    // Vitest leaves one core free, which on two cores would run the files one after another.
    maxWorkers: 2,
    projects: [
      {
        resolve: { alias: reactNativeWeb, extensions: webFirst },
        test: {
          name: 'unit',
          include: ['tests/unit/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/support/quiet-console.ts'],
          server: { deps: { inline: [/react-native/] } },
          testTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          setupFiles: ['tests/support/quiet-console.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          fileParallelism: false,
          // A journey is many pages long; on a busy machine each takes seconds.
          testTimeout: 600_000,
          hookTimeout: 300_000,
        },
      },
    ],
  },
});
