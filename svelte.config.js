import adapter from '@sveltejs/adapter-node';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

/** Folders outside src that the type check must cover as well; Kit's generated tsconfig knows only src and tests. */
const TYPED_FOLDERS = ['migrations', 'templates', 'minio-fake', 'scripts'];

/** @type {import('@sveltejs/kit').Config} */
export default {
	preprocess: vitePreprocess(),
	compilerOptions: {
		runes: ({ filename }) => (filename.includes('node_modules') ? undefined : true)
	},
	kit: {
		adapter: adapter(),
		alias: { $templates: 'templates' },
		csp: {
			mode: 'nonce',
			directives: {
				'default-src': ['self'],
				'script-src': ['self'],
				'style-src': ['self'],
				// The one style attribute of the framework's own route announcer, set in the browser.
				'style-src-attr': ['unsafe-hashes', 'sha256-S8qMpvofolR8Mpjy4kQvEm7m1q8clzU4dfDH0AmvZjo='],
				'img-src': ['self', 'data:'],
				'font-src': ['self'],
				'connect-src': ['self'],
				'frame-src': ['self'],
				'object-src': ['none'],
				'base-uri': ['self'],
				'form-action': ['self'],
				'frame-ancestors': ['none']
			}
		},
		typescript: {
			config: (config) => {
				for (const folder of TYPED_FOLDERS) config.include.push(`../${folder}/**/*.ts`);
				config.include.push('../*.config.ts');
				return config;
			}
		}
	}
};
