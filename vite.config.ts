import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  html: { cspNonce: 'CSP_NONCE' },
  plugins: [react(), tailwindcss()],
  build: {
    outDir: 'dist/client',
    emptyOutDir: true,
    manifest: true,
    assetsInlineLimit: 0,
    chunkSizeWarningLimit: 1400,
  },
  server: {
    host: '127.0.0.1',
    watch: { ignored: ['**/.muslin/**'] },
    fs: { deny: ['.muslin', '.env', '.env.*', '*.{crt,pem}', '**/.git/**', '**/.muslin/**'] },
    proxy: {
      '/api': 'http://127.0.0.1:3000',
      '/tiles': 'http://127.0.0.1:3000',
      '/relief': 'http://127.0.0.1:3000',
    },
  },
  test: {
    // Vitest leaves a core for itself; on two cores that would leave one to the tests.
    maxWorkers: 2,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          // A file finds the modules loaded that another has loaded: half of the time of small files. Nothing may hang on a fresh one.
          isolate: false,
          include: ['tests/{engine,contract,checks,client,architecture,data}/**/*.test.{ts,tsx}'],
          env: { TZ: 'Pacific/Chatham' },
          // Two runs may share two cores; a test that hangs is still found.
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'server',
          isolate: false,
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/support/database.ts'],
          env: { TZ: 'UTC' },
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'e2e',
          include: ['tests/e2e/**/*.test.ts'],
          globalSetup: ['tests/support/database.ts', 'tests/support/built-client.ts'],
          env: { TZ: 'UTC' },
          testTimeout: 120_000,
          hookTimeout: 300_000,
        },
      },
    ],
  },
});
