import { fileURLToPath } from 'node:url';
import mdx from '@astrojs/mdx';
import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwind from '@astrojs/tailwind';
import auth from 'auth-astro';
import { defineConfig } from 'astro/config';

/** Packages with native code or that find their own files: Node loads them, the bundler leaves them alone. */
const LEFT_TO_NODE = [
  'better-sqlite3',
  'sharp',
  '@resvg/resvg-js',
  '@node-rs/argon2',
  'nodemailer',
  'smtp-server',
  'mailparser',
];

export default defineConfig({
  output: 'server',
  // Standalone rather than middleware: its handler also serves dist/client with the right headers.
  // scripts/site.ts switches its own listening off and puts our server round it.
  adapter: node({ mode: 'standalone' }),
  integrations: [
    react(),
    mdx(),
    // src/styles/global.css holds the Tailwind layers.
    tailwind({ applyBaseStyles: false }),
    auth(),
  ],
  // Nothing uses Astro's sessions; without a driver named here the adapter would write them to disk.
  session: { driver: 'memory' },
  // The hosts we answer to are known at run time only, so every Host passes here
  // and scripts/site.ts checks it first (docs/decisions/001-own-server.md).
  // Astro's own origin check knows no exception, and one-click unsubscribing needs one: src/middleware.ts checks instead.
  security: { checkOrigin: false, allowedDomains: [{}] },
  prefetch: false,
  devToolbar: { enabled: false },
  experimental: {
    // Astro adds the hashes of its own styles and scripts. `frame-ancestors` comes from scripts/site.ts.
    csp: {
      directives: [
        "default-src 'self'",
        "img-src 'self' data: blob:",
        "object-src 'none'",
        "base-uri 'self'",
        "form-action 'self'",
        // Sheets are planned beside the page.
        "worker-src 'self'",
      ],
    },
  },
  server: { port: Number(process.env.PORT) || 4321, host: process.env.HOST || '127.0.0.1' },
  vite: {
    ...(process.env.VITE_CACHE_DIR ? { cacheDir: process.env.VITE_CACHE_DIR } : {}),
    // Pages have this from tsconfig.json; what a worker is bundled with reads it only here.
    resolve: { alias: { '@': fileURLToPath(new URL('./src', import.meta.url)) } },
    ssr: { external: LEFT_TO_NODE },
    server: { watch: { ignored: ['**/.data/**', '**/dist/**', '**/test-results/**'] } },
  },
});
