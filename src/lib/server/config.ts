import { z } from 'zod';

/** The only reader of the environment. Read at first use, so that tests and commands may set it before. */
const environmentSchema = z.object({
	DATABASE_URL: z.string().min(1),
	ORIGIN: z.url().default('http://127.0.0.1:4310'),
	WORKSPACE_NAME: z.string().min(1).default('Wendmoor Laboratories'),
	S3_ENDPOINT: z.url().optional(),
	S3_REGION: z.string().default('us-east-1'),
	S3_BUCKET: z.string().min(1).default('costmary'),
	S3_ACCESS_KEY_ID: z.string().min(1),
	S3_SECRET_ACCESS_KEY: z.string().min(1),
	S3_FORCE_PATH_STYLE: z.enum(['true', 'false']).default('true'),
	SMTP_URL: z.string().optional(),
	BUILD_WORKER_DIR: z.string().default('build-worker'),
	FONTS_DIR: z.string().default('templates/fonts')
});

export interface StorageConfig {
	readonly endpoint: string | undefined;
	readonly region: string;
	readonly bucket: string;
	readonly accessKeyId: string;
	readonly secretAccessKey: string;
	readonly forcePathStyle: boolean;
}

export interface Config {
	readonly databaseUrl: string;
	readonly origin: string;
	readonly secureCookies: boolean;
	readonly workspaceName: string;
	readonly storage: StorageConfig;
	readonly smtpUrl: string | undefined;
	readonly buildWorkerDir: string;
	readonly fontsDir: string;
}

let cached: Config | undefined;

/** @throws when a variable is missing or malformed; the message names each one. */
export function config(): Config {
	cached ??= read(process.env);
	return cached;
}

function read(environment: NodeJS.ProcessEnv): Config {
	const parsed = environmentSchema.safeParse(environment);
	if (!parsed.success) {
		const faults = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
		throw new Error(`The environment is not complete. ${faults.join('; ')}`);
	}
	const env = parsed.data;
	return {
		databaseUrl: env.DATABASE_URL,
		origin: env.ORIGIN,
		secureCookies: env.ORIGIN.startsWith('https:'),
		workspaceName: env.WORKSPACE_NAME,
		storage: {
			endpoint: env.S3_ENDPOINT,
			region: env.S3_REGION,
			bucket: env.S3_BUCKET,
			accessKeyId: env.S3_ACCESS_KEY_ID,
			secretAccessKey: env.S3_SECRET_ACCESS_KEY,
			forcePathStyle: env.S3_FORCE_PATH_STYLE === 'true'
		},
		smtpUrl: env.SMTP_URL,
		buildWorkerDir: env.BUILD_WORKER_DIR,
		fontsDir: env.FONTS_DIR
	};
}
