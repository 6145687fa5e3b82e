import { databaseHandle } from './database-handle.js';
import { environment } from './environment.js';
import { importDirection } from './import-direction.js';
import { inlineStyle } from './inline-style.js';
import { literalText } from './literal-text.js';
import { pureDomain } from './pure-domain.js';

// Own rules rather than no-restricted-imports and no-restricted-syntax: in a flat configuration the last entry that
// matches a file replaces the options of those, so a second ban would silently lift the first.
const plugin = {
	rules: {
		'database-handle': databaseHandle,
		environment,
		'import-direction': importDirection,
		'inline-style': inlineStyle,
		'literal-text': literalText,
		'pure-domain': pureDomain
	}
};

/** The rules of this house, for the end of eslint.config.js. */
export const houseRules = [
	{
		plugins: { house: plugin },
		rules: {
			'house/database-handle': 'error',
			'house/environment': 'error',
			'house/import-direction': 'error',
			'house/pure-domain': 'error'
		}
	},
	{
		files: ['**/*.svelte'],
		rules: { 'house/inline-style': 'error', 'house/literal-text': 'error' }
	}
];
