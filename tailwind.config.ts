import type { Config } from 'tailwindcss';

/** A token that follows the theme: its value is the custom property that src/app.css sets for each theme. */
const token = (name: string) => `var(--${name})`;

/** The design tokens, once. Values per theme: `themes` below; src/app.css writes them out. */
export default {
	content: ['./src/**/*.{html,svelte,ts}'],
	theme: {
		colors: {
			transparent: 'transparent',
			current: 'currentColor',
			ground: token('ground'),
			field: token('field'),
			band: token('band'),
			ink: token('ink'),
			'ink-2': token('ink-2'),
			'ink-3': token('ink-3'),
			hair: token('hair'),
			edge: token('edge'),
			action: token('action'),
			'on-action': token('on-action'),
			pass: token('pass'),
			near: token('near'),
			miss: token('miss'),
			dye: token('dye'),
			plate: token('plate'),
			steel: token('steel'),
			'steel-2': token('steel-2'),
			'steel-3': token('steel-3'),
			axis: token('axis'),
			'dye-hair': token('dye-hair'),
			brass: token('brass'),
			'dye-pass': token('dye-pass'),
			'dye-near': token('dye-near'),
			'dye-miss': token('dye-miss'),
			'series-1': token('series-1'),
			'series-2': token('series-2'),
			'series-3': token('series-3'),
			'series-4': token('series-4'),
			'series-5': token('series-5'),
			'series-6': token('series-6')
		},
		spacing: {
			0: '0',
			px: '1px',
			1: '4px',
			2: '8px',
			3: '12px',
			4: '16px',
			6: '24px',
			7: '28px',
			8: '32px',
			11: '44px',
			12: '48px',
			14: '56px',
			rail: '176px',
			table: '400px'
		},
		fontFamily: { mono: ['"JetBrains Mono"', 'ui-monospace', 'monospace'] },
		fontSize: {
			tick: ['11px', '16px'],
			table: ['13px', '20px'],
			text: ['15px', '24px'],
			figure: ['18px', '24px'],
			title: ['22px', '28px'],
			answer: ['34px', '40px']
		},
		fontWeight: { normal: '400', medium: '500', bold: '700' },
		borderRadius: { none: '0' },
		screens: { tablet: '640px', desk: '1024px' },
		extend: {
			strokeWidth: { fine: '0.75', line: '1.25', bold: '2' }
		}
	}
} satisfies Config;
