import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));

export default defineConfig({
  resolve: {
    alias: {
      '@': here('./src'),
      // Astro's virtual modules, for routes and middleware called directly.
      'astro:middleware': 'astro/virtual-modules/middleware.js',
      'auth:config': here('./auth.config.ts'),
    },
  },
  ...(process.env.VITE_CACHE_DIR ? { cacheDir: process.env.VITE_CACHE_DIR } : {}),
  test: {
    environment: 'node',
    include: ['tests/**/*.test.{ts,tsx}'],
    setupFiles: ['tests/setup/environment.ts', 'tests/setup/console.ts'],
    globalSetup: ['tests/setup/temporary-folder.ts'],
    // auth-astro is published as TypeScript.
    server: { deps: { inline: ['auth-astro'] } },
    // On a small machine the usual number leaves half of it idle; whole patterns take their time.
    maxWorkers: '100%',
    testTimeout: 60_000,
    restoreMocks: true,
    unstubEnvs: true,
  },
});
