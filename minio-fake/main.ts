import { parseArgs } from 'node:util';
import { startBucket } from './server';

const { values } = parseArgs({
	options: {
		port: { type: 'string', default: '0' },
		host: { type: 'string', default: '127.0.0.1' },
		data: { type: 'string' },
		bucket: { type: 'string', default: 'costmary' },
		region: { type: 'string', default: 'us-east-1' },
		cors: { type: 'string', multiple: true, default: [] },
		controls: { type: 'boolean', default: false }
	}
});

if (values.data === undefined || !/^\d{1,5}$/.test(values.port)) {
	console.error(
		'Usage: main.ts --data DIR [--port N] [--host H] [--bucket B] [--region R] [--cors ORIGIN]… [--controls]'
	);
	process.exit(2);
}

// Keys come by environment: arguments can be read by every user of the machine.
const accessKeyId = process.env.S3_ACCESS_KEY_ID;
const secretAccessKey = process.env.S3_SECRET_ACCESS_KEY;

const running = await startBucket({
	dataDir: values.data,
	port: Number(values.port),
	host: values.host,
	bucket: values.bucket,
	region: values.region,
	corsOrigins: values.cors,
	controls: values.controls,
	...(accessKeyId ? { accessKeyId } : {}),
	...(secretAccessKey ? { secretAccessKey } : {})
});
console.log(JSON.stringify({ port: running.port }));

for (const signal of ['SIGTERM', 'SIGINT'] as const) {
	process.once(signal, () => void running.close().then(() => process.exit(0)));
}
