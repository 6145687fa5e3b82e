import { defineConfig } from '@playwright/test';

export default defineConfig({
	testDir: 'tests/e2e',
	outputDir: 'test-results',
	// Each worker runs an application, a job worker and a browser of its own: more than one per core only waits.
	workers: 2,
	fullyParallel: false,
	retries: 0,
	forbidOnly: true,
	timeout: 90_000,
	expect: { timeout: 10_000 },
	use: {
		browserName: 'chromium',
		locale: 'en-GB',
		timezoneId: 'Europe/Berlin',
		viewport: { width: 1440, height: 900 },
		reducedMotion: 'reduce',
		trace: 'retain-on-failure',
		screenshot: 'only-on-failure',
		launchOptions: {
			// Debian's browser; Playwright's own is never downloaded.
			executablePath: '/usr/bin/chromium',
			args: [
				'--no-sandbox',
				'--disable-gpu',
				'--disable-quic',
				'--no-first-run',
				'--disable-background-networking',
				'--disable-component-update',
				'--disable-sync',
				'--disable-dev-shm-usage'
			]
		}
	}
});
