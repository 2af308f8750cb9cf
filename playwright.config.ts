import { existsSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { defineConfig } from '@playwright/test';

/*
 * Browser tests run against the built site with a demo of its own, in a folder of its own.
 * This file is read again in every worker process: what is chosen here is kept in the environment.
 */
const env = process.env;
env.BROWSER_TEST_PORT ??= '4390';
env.BROWSER_TEST_DATA ??= mkdtempSync(join(tmpdir(), 'foldwright-browser-'));
const baseURL = `http://localhost:${env.BROWSER_TEST_PORT}`;
const installed = [env.CHROMIUM, '/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];
const executablePath = installed.find((path) => path && existsSync(path));

export default defineConfig({
  testDir: 'tests/browser',
  testMatch: '**/*.spec.ts',
  outputDir: 'test-results',
  workers: 1,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  forbidOnly: Boolean(env.CI),
  reporter: env.PLAYWRIGHT_JSON_OUTPUT_FILE ? [['list'], ['json']] : [['list']],
  use: {
    baseURL,
    launchOptions: { ...(executablePath ? { executablePath } : {}), args: ['--no-sandbox', '--disable-dev-shm-usage'] },
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
  },
  webServer: {
    // Builds when dist/ is not of these sources, migrates, seeds, sends mail to the local mail server.
    command: 'node scripts/start.mjs',
    url: `${baseURL}/api/health`,
    timeout: 240_000,
    stdout: 'ignore',
    stderr: 'pipe',
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
    env: {
      PORT: env.BROWSER_TEST_PORT,
      HOST: '127.0.0.1',
      SITE_URL: baseURL,
      DATA_DIR: env.BROWSER_TEST_DATA,
      DEMO: '1',
      SMTP_URL: '',
      MAIL_FROM: '',
      ALLOWED_HOSTS: '',
      TRUST_PROXY: '',
      AUTH_SECRET: '',
    },
  },
});
