import { defineConfig } from 'vite';
import { fileURLToPath } from 'node:url';

const at = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/** Everything that runs outside the web process: the worker, its PDF child and the commands of package.json. */
export default defineConfig({
	resolve: { alias: { $lib: at('src/lib'), $templates: at('templates') } },
	publicDir: false,
	build: {
		ssr: true,
		outDir: 'build-worker',
		target: 'node20',
		sourcemap: true,
		rolldownOptions: {
			input: {
				worker: at('src/worker.ts'),
				'pdf-child': at('src/lib/server/pdf/child.ts'),
				migrate: at('scripts/migrate.ts'),
				demo: at('scripts/demo.ts'),
				'verify-audit': at('scripts/verify-audit.ts'),
				bench: at('scripts/bench.ts')
			}
		}
	}
});
