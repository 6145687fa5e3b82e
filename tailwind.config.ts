import type { Config } from 'tailwindcss';
import plugin from 'tailwindcss/plugin';
import { colourNames, fontSizes, screens, themeRules } from './src/lib/ui/tokens';

const SYSTEM_SANS = ['system-ui', 'sans-serif'];
const SYSTEM_MONO = ['ui-monospace', 'monospace'];

export default {
	content: ['./src/**/*.{svelte,ts,html}'],
	theme: {
		colors: { ...colourNames, transparent: 'transparent', current: 'currentColor', inherit: 'inherit' },
		extend: {
			screens,
			fontSize: fontSizes,
			fontFamily: { sans: ['"Noto Sans"', ...SYSTEM_SANS], mono: ['"Noto Sans Mono"', ...SYSTEM_MONO] },
			borderRadius: { DEFAULT: '3px' },
			boxShadow: { drawer: '-8px 0 24px rgb(0 0 0 / 0.18)' },
			spacing: { spine: '13rem', 'spine-narrow': '9.5rem', sheet: '62rem', margin: '20rem' }
		}
	},
	plugins: [plugin(({ addBase }) => addBase(themeRules))]
} satisfies Config;
