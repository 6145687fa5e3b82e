import path from 'node:path';

/**
 * The house in one table: which layer a file belongs to, which layers it may import, and which packages it may not.
 * Layers run one way; whatever is not named in `imports` is refused. `types` names layers that may lend types only.
 */
const PURE = /^./;
const BROWSER_CANNOT = /^(node:|kysely$|kysely\/|pg$|pg-boss$|@aws-sdk\/|nodemailer$|pdfmake$|lucia$|@node-rs\/)/;
const FRAMEWORK = /^(\$app\/|\$env\/|svelte$|svelte\/|@sveltejs\/)/;
const KIT_ALIASES = /^(\$app\/|\$env\/)/;
const ENVIRONMENT = /^\$env\//;

const either = (...patterns) => new RegExp(patterns.map((pattern) => `(?:${pattern.source})`).join('|'));

export const LAYERS = {
	domain: { imports: ['domain'], types: [], refusedPackages: PURE },
	schemas: { imports: ['schemas', 'domain'], types: [], refusedPackages: either(BROWSER_CANNOT, FRAMEWORK) },
	reference: { imports: ['reference', 'schemas'], types: [], refusedPackages: either(BROWSER_CANNOT, FRAMEWORK) },
	server: {
		imports: ['server', 'domain', 'reference', 'schemas', 'templates'],
		types: [],
		refusedPackages: KIT_ALIASES
	},
	ui: { imports: ['ui', 'domain', 'schemas'], types: [], refusedPackages: either(BROWSER_CANNOT, ENVIRONMENT) },
	routes: { imports: ['routes', 'ui', 'schemas'], types: [], refusedPackages: either(BROWSER_CANNOT, ENVIRONMENT) },
	'server routes': { imports: ['routes', 'server', 'ui', 'schemas'], types: [], refusedPackages: ENVIRONMENT },
	entry: {
		imports: ['entry', 'server', 'schemas', 'reference', 'domain', 'ui'],
		types: [],
		refusedPackages: ENVIRONMENT
	},
	templates: { imports: ['templates'], types: ['domain'], refusedPackages: either(BROWSER_CANNOT, FRAMEWORK) },
	migrations: { imports: ['migrations'], types: [], refusedPackages: /^(?!kysely$)/ },
	'bucket stand-in': { imports: ['bucket stand-in'], types: [], refusedPackages: FRAMEWORK }
};

const FOLDERS = [
	['src/lib/domain/', 'domain'],
	['src/lib/reference/', 'reference'],
	['src/lib/schemas/', 'schemas'],
	['src/lib/server/', 'server'],
	['src/lib/ui/', 'ui'],
	['src/routes/', 'routes'],
	// The one stylesheet is part of the look; the root layout takes it in.
	['src/app.css', 'ui'],
	['src/', 'entry'],
	['templates/', 'templates'],
	['migrations/', 'migrations'],
	['minio-fake/', 'bucket stand-in'],
	['scripts/', 'scripts'],
	['tests/', 'tests']
];

const SERVER_ROUTE = /\/(\+(page|layout)\.server|\+server)\.[jt]s$/;
const TEST_FILE = /\.(test|spec)\.[jt]s$/;

/** Path from the project's root with forward slashes, or null when the file lies outside it. */
export function projectPath(root, filename) {
	const relative = path.relative(root, filename).split(path.sep).join('/');
	return relative.startsWith('..') || path.isAbsolute(relative) ? null : relative;
}

/** The layer of a file named from the project's root; null where the house has no rule (configuration files). */
export function layerOf(file) {
	const found = FOLDERS.find(([folder]) => file.startsWith(folder));
	if (!found) return null;
	return found[1] === 'routes' && SERVER_ROUTE.test(file) ? 'server routes' : found[1];
}

export const isTest = (file) => TEST_FILE.test(file) || file.startsWith('tests/');

/** Where an import points, named from the project's root; null when it names a package. */
export function targetOf(specifier, fromFile) {
	const bare = specifier.split('?')[0] ?? '';
	if (bare === '$lib' || bare.startsWith('$lib/')) return `src/lib${bare.slice('$lib'.length)}`;
	if (bare === '$templates' || bare.startsWith('$templates/')) return `templates${bare.slice('$templates'.length)}`;
	if (bare.startsWith('/')) return bare.slice(1);
	if (bare.startsWith('.')) return path.posix.normalize(path.posix.join(path.posix.dirname(fromFile), bare));
	return null;
}

/** The layer an import points into; a folder without its trailing slash still counts ("$lib/server"). */
export const targetLayer = (target) => {
	const layer = layerOf(`${target}/`);
	return layer === 'server routes' ? 'routes' : layer;
};
