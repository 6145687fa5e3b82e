import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';

const IGNORED_BY_WATCH = ['**/.data/**', '**/build/**', '**/build-worker/**'];

export default defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	server: { watch: { ignored: IGNORED_BY_WATCH } },
	test: {
		projects: [
			{
				extends: true,
				test: {
					name: 'domain',
					environment: 'node',
					include: [
						'src/lib/{domain,reference,schemas}/**/*.test.ts',
						'src/lib/server/**/*.test.ts',
						'templates/**/*.test.ts',
						'minio-fake/**/*.test.ts',
						'tests/reference/**/*.test.ts',
						'tests/house/**/*.test.ts'
					]
				}
			},
			{
				extends: true,
				resolve: { conditions: ['browser'] },
				test: {
					name: 'ui',
					environment: 'jsdom',
					include: ['src/lib/ui/**/*.test.ts', 'src/routes/**/*.test.ts']
				}
			},
			{
				extends: true,
				test: {
					name: 'integration',
					environment: 'node',
					include: ['tests/integration/**/*.test.ts'],
					setupFiles: ['tests/integration/setup.ts'],
					testTimeout: 30_000,
					hookTimeout: 60_000,
					fileParallelism: true,
					maxWorkers: 2
				}
			}
		]
	}
});
