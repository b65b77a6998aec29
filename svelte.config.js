import adapter from '@sveltejs/adapter-node';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

// The test run builds beside a running demo, so both output folders can be moved.
const buildFolder = process.env.TRAMMEL_BUILD_DIR ?? 'build';
const kitFolder = process.env.TRAMMEL_KIT_DIR ?? '.svelte-kit';

/** @type {import('@sveltejs/kit').Config} */
export default {
	preprocess: vitePreprocess(),
	compilerOptions: { runes: ({ filename }) => (filename.includes('node_modules') ? undefined : true) },
	kit: {
		adapter: adapter({ out: buildFolder }),
		outDir: kitFolder,
		// The package's barrel of adapters imports every validation library there is.
		alias: { 'superforms-zod4': 'node_modules/sveltekit-superforms/dist/adapters/zod4' },
		csp: {
			mode: 'auto',
			directives: {
				'default-src': ['self'],
				'script-src': ['self'],
				'style-src': ['self'],
				// Drawings set computed positions and dash patterns on their own elements.
				'style-src-attr': ['unsafe-inline'],
				'img-src': ['self', 'data:', 'blob:'],
				'font-src': ['self'],
				'connect-src': ['self'],
				'object-src': ['none'],
				'base-uri': ['none'],
				'form-action': ['self'],
				'frame-ancestors': ['none']
			}
		}
	}
};
