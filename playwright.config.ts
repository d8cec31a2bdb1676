import os from 'node:os';
import path from 'node:path';
import { defineConfig, devices } from '@playwright/test';
import { chromiumPath } from '#scripts/chromium.ts';

const PORT = Number(process.env['E2E_PORT'] ?? 4399);
const REPORT = process.env['E2E_REPORT'];

// Tests find the cluster here, to take the database away and bring it back.
process.env['E2E_DATA'] ??= path.join(os.tmpdir(), `spinward-test-${process.pid}-browser`);

export default defineConfig({
  testDir: 'tests/e2e',
  testMatch: '**/*.spec.ts',
  outputDir: 'test-results/browser',
  workers: 1,
  fullyParallel: false,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  forbidOnly: Boolean(process.env['CI']),
  // A browser on a busy machine stumbles now and then; what passes at the second try is counted and named as flaky.
  retries: process.env['CI'] ? 1 : 0,
  reporter: [['list'], ...(REPORT ? [['json', { outputFile: REPORT }] as const] : [])],
  use: {
    ...devices['Desktop Chrome'],
    viewport: { width: 1440, height: 900 },
    baseURL: `http://127.0.0.1:${PORT}`,
    timezoneId: 'UTC',
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    launchOptions: {
      ...(chromiumPath() ? { executablePath: chromiumPath() } : {}),
      args: [
        '--no-sandbox',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--use-angle=swiftshader',
        '--enable-unsafe-swiftshader',
        '--ignore-gpu-blocklist',
      ],
    },
  },
  webServer: {
    command: 'node --import tsx scripts/e2e-server.ts',
    url: `http://127.0.0.1:${PORT}/api/health`,
    env: { PORT: String(PORT), SPINWARD_DATA: process.env['E2E_DATA'] },
    reuseExistingServer: false,
    timeout: 240_000,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 15_000 },
    stdout: 'pipe',
  },
});
