import { randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { parseAddress } from './address';
import { headersOf, sendXml } from './call';
import { Control } from './control';
import { allowOrigin, answerPreflight } from './cors';
import { Uploads } from './multipart';
import { Body } from './payload';
import { Problem } from './problem';
import { operationFor } from './routes';
import { verify, type Keys } from './sigv4';
import { Store } from './store';

export interface BucketOptions {
	/** Where objects are kept; made when missing. */
	readonly dataDir: string;
	/** 0 or left out: any free port. */
	readonly port?: number;
	readonly host?: string;
	readonly bucket?: string;
	readonly accessKeyId?: string;
	readonly secretAccessKey?: string;
	readonly region?: string;
	/** Origins whose pages may call the bucket directly. */
	readonly corsOrigins?: readonly string[];
	/** Offers the controls under /-/ over HTTP. */
	readonly controls?: boolean;
	readonly clock?: () => Date;
}

export interface RunningBucket {
	readonly endpoint: string;
	readonly port: number;
	readonly bucket: string;
	readonly region: string;
	readonly accessKeyId: string;
	readonly secretAccessKey: string;
	readonly control: Control;
	close(): Promise<void>;
}

interface Desk {
	readonly bucket: string;
	readonly keys: Keys;
	readonly corsOrigins: readonly string[];
	readonly controls: boolean;
	readonly clock: () => Date;
	readonly store: Store;
	readonly uploads: Uploads;
	readonly control: Control;
}

async function answer(desk: Desk, request: IncomingMessage, response: ServerResponse): Promise<void> {
	const method = request.method ?? '';
	const target = request.url ?? '';
	const headers = headersOf(request);
	if (desk.controls && target.startsWith('/-/')) return desk.control.answer(request, response);
	allowOrigin(response, headers, desk.corsOrigins);
	if (method === 'OPTIONS') return answerPreflight(response, headers, desk.corsOrigins);
	const address = parseAddress(target);
	const verified = verify(method, address, headers, desk.keys, desk.clock());
	desk.control.meet(method, request);
	if (address.bucket !== desk.bucket) throw new Problem('NoSuchBucket', 'The bucket does not exist.');
	const operation = operationFor(method, address, headers);
	const body = new Body(request, headers, address.query, verified);
	const { bucket, store, uploads } = desk;
	await operation({ method, address, key: address.key ?? '', headers, body, response, bucket, store, uploads });
}

/** A fault is written to the standard error: a stand-in that hides its own bugs costs hours elsewhere. */
function problemOf(error: unknown, request: IncomingMessage): Problem {
	if (error instanceof Problem) return error;
	if (!request.socket.destroyed) console.error(error);
	return new Problem('InternalError', 'The stand-in met a fault of its own.');
}

function refuse(error: unknown, request: IncomingMessage, response: ServerResponse, requestId: string): void {
	const problem = problemOf(error, request);
	if (response.headersSent || request.socket.destroyed) {
		response.destroy();
		return;
	}
	// The rest of the body is read away, so that the sender sees the answer instead of a broken pipe.
	if (!request.complete) response.setHeader('connection', 'close');
	request.resume();
	if (request.method === 'HEAD' || problem.status === 304) {
		response.writeHead(problem.status);
		response.end();
		return;
	}
	const [resource = ''] = (request.url ?? '').split('?');
	const fields = [
		['Code', problem.code],
		['Message', problem.message],
		['Resource', resource],
		['RequestId', requestId]
	] as const;
	sendXml(response, ['Error', fields], problem.status);
}

const listening = (server: Server, port: number, host: string): Promise<void> =>
	new Promise((resolve, reject) => {
		server.once('error', reject);
		server.listen(port, host, () => {
			server.off('error', reject);
			resolve();
		});
	});

const closed = (server: Server): Promise<void> =>
	new Promise((resolve) => {
		server.close(() => resolve());
		server.closeAllConnections();
	});

/** Starts a bucket on this machine; the same one that `main.ts` runs as a process of its own. */
export async function startBucket(options: BucketOptions): Promise<RunningBucket> {
	const { host = '127.0.0.1', bucket = 'costmary', region = 'us-east-1' } = options;
	const { accessKeyId = 'local-access-key', secretAccessKey = 'local-secret-key' } = options;
	const store = await Store.open(options.dataDir);
	const uploads = await Uploads.open(options.dataDir, store);
	const control = new Control(store, uploads);
	const { corsOrigins = [], controls = false, clock = () => new Date() } = options;
	const keys = { accessKeyId, secretAccessKey, region };
	const desk: Desk = { bucket, keys, corsOrigins, controls, clock, store, uploads, control };
	const server = createServer((request, response) => {
		const requestId = randomUUID();
		response.setHeader('x-amz-request-id', requestId);
		answer(desk, request, response).catch((error: unknown) => refuse(error, request, response, requestId));
	});
	// A part of 8 MiB over a slow line must not be cut by Node's own limit of five minutes for a request.
	server.requestTimeout = 0;
	await listening(server, options.port ?? 0, host);
	const { port } = server.address() as AddressInfo;
	const close = () => closed(server);
	return { endpoint: `http://${host}:${port}`, port, bucket, region, accessKeyId, secretAccessKey, control, close };
}
