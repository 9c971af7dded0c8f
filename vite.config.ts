/// <reference types="vitest/config" />
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

// Tests look at structure and behaviour, not at generated styles.
const isUnderTest = process.env['VITEST'] !== undefined;

export default defineConfig({
  publicDir: 'src/public',
  plugins: isUnderTest ? [react()] : [react(), tailwindcss()],
  worker: { format: 'es' },
  build: {
    outDir: 'dist/client',
    emptyOutDir: true,
    target: 'es2023',
    // Fonts within a style sheet would need data: in the content security policy.
    assetsInlineLimit: 0,
    // The editor is one lazy piece of this size; everything else stays far below.
    chunkSizeWarningLimit: 4500,
  },
  server: { host: '127.0.0.1' },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          environment: 'node',
          include: ['tests/unit/**/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'dom',
          environment: 'jsdom',
          include: ['tests/unit/**/*.test.tsx', 'tests/dom/**/*.test.{ts,tsx}'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'api',
          environment: 'node',
          include: ['tests/api/**/*.test.ts'],
          // Each file works on a database of its own; more than two at once only wait for the disk.
          pool: 'forks',
          maxWorkers: 2,
          testTimeout: 60_000,
          hookTimeout: 120_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          environment: 'node',
          include: ['tests/browser/**/*.test.ts'],
          // One Chromium at a time, so that its timing is not that of a crowded machine.
          pool: 'forks',
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
});
