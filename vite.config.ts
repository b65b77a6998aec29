import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vite';

export default defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	// Native or server-only packages stay outside the server bundle.
	ssr: { external: ['@node-rs/argon2', 'mariadb', 'sequelize', 'pino'] },
	build: { target: 'es2022' },
	// The private server writes into its folder all the time, and test runs build beside the development server.
	server: { watch: { ignored: ['**/.data/**', '**/.test/**', '**/.screens/**'] } }
});
