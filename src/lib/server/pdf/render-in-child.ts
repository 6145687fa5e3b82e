import { spawn, type ChildProcessByStdio } from 'node:child_process';
import { createInterface } from 'node:readline';
import type { Readable, Writable } from 'node:stream';
import type { PdfFailureCode, PdfProgress, PdfRequest } from './request';

export interface ChildOptions {
	/** The built entry, `build-worker/pdf-child.js`. */
	readonly childPath: string;
	readonly timeoutMs: number;
	readonly maxOldSpaceMb: number;
	readonly signal?: AbortSignal;
	readonly onProgress?: (progress: Exclude<PdfProgress, { step: 'failed' }>) => void;
	/** Passed on to the child; by default `templates/fonts` under the working folder. */
	readonly fontFolder?: string;
	/** Before the entry, for example a loader in tests. */
	readonly nodeArguments?: readonly string[];
}

/** Why no file came: `code` is what the caller decides on, the message is for the log. */
export class PdfFailed extends Error {
	constructor(
		readonly code: PdfFailureCode,
		message: string
	) {
		super(message);
		this.name = 'PdfFailed';
	}
}

type Child = ChildProcessByStdio<Writable, Readable, Readable>;

/** What a process that ran out of its heap says, or how it ends, on Node 20. */
const OUT_OF_MEMORY = /heap out of memory|Allocation failed/i;
const KEPT_WORDS = 2000;

/**
 * Prints a request in a process of its own, so that layout neither holds the event loop nor can exhaust the worker's
 * memory. The child gets no environment but the zone: it needs no secret. It is killed at the time limit and when the
 * signal fires; the promise settles only when it is gone, so that nothing is left running.
 *
 * @throws PdfFailed with a code.
 */
export async function renderInChild(request: PdfRequest, options: ChildOptions): Promise<Uint8Array> {
	if (options.signal?.aborted) throw new PdfFailed('cancelled', 'Cancelled before it began');
	const child = start(options);
	let ended: PdfFailureCode | null = null;
	const end = (code: PdfFailureCode) => {
		ended ??= code;
		child.kill('SIGKILL');
	};
	const timer = setTimeout(() => end('timedOut'), options.timeoutMs);
	const cancel = () => end('cancelled');
	options.signal?.addEventListener('abort', cancel, { once: true });
	try {
		const heard = listen(child, options.onProgress);
		const [file, exit] = await Promise.all([collect(child.stdout), exitOf(child), send(child, request)]);
		if (ended) throw new PdfFailed(ended, ended === 'timedOut' ? `Not done in ${options.timeoutMs} ms` : 'Cancelled');
		if (exit === 0 && !heard.failure && file.length > 0) return file;
		throw heard.failure ?? deathOf(exit, heard.words());
	} finally {
		clearTimeout(timer);
		options.signal?.removeEventListener('abort', cancel);
	}
}

function start(options: ChildOptions): Child {
	const given = options.nodeArguments ?? [];
	const tail = options.fontFolder === undefined ? [] : [options.fontFolder];
	return spawn(
		process.execPath,
		[`--max-old-space-size=${options.maxOldSpaceMb}`, ...given, options.childPath, ...tail],
		{ stdio: ['pipe', 'pipe', 'pipe'], env: { TZ: 'UTC' } }
	);
}

/** A child that dies early breaks the pipe; how it died is told by its exit and not by the pipe. */
const send = (child: Child, request: PdfRequest) =>
	new Promise<void>((resolve) => {
		child.stdin.on('error', () => resolve());
		child.stdin.end(JSON.stringify(request), () => resolve());
	});

async function collect(stream: Readable): Promise<Uint8Array> {
	const chunks: Buffer[] = [];
	for await (const chunk of stream) chunks.push(Buffer.from(chunk));
	return new Uint8Array(Buffer.concat(chunks));
}

/** Exit code, or the signal's name. */
const exitOf = (child: Child) =>
	new Promise<number | string>((resolve, reject) => {
		child.once('error', (error) => reject(new PdfFailed('notStarted', error.message)));
		child.once('close', (code, signal) => resolve(code ?? signal ?? 'unknown'));
	});

interface Heard {
	failure: PdfFailed | null;
	words(): string;
}

function listen(child: Child, onProgress: ChildOptions['onProgress']): Heard {
	let kept = '';
	const heard: Heard = { failure: null, words: () => kept };
	createInterface({ input: child.stderr }).on('line', (line) => {
		const progress = readLine(line);
		if (!progress) kept = `${kept}${line}\n`.slice(-KEPT_WORDS);
		else if (progress.step === 'failed') heard.failure = new PdfFailed(progress.code, progress.message);
		else onProgress?.(progress);
	});
	return heard;
}

/** A line that is not ours (a crash report of the runtime) is kept for the log. */
function readLine(line: string): PdfProgress | null {
	if (!line.startsWith('{"step":')) return null;
	try {
		return JSON.parse(line) as PdfProgress;
	} catch {
		return null;
	}
}

function deathOf(exit: number | string, words: string): PdfFailed {
	if (exit === 'SIGABRT' || OUT_OF_MEMORY.test(words))
		return new PdfFailed('outOfMemory', 'The memory limit was reached');
	return new PdfFailed('failed', `Ended with ${exit}: ${words.trim()}`);
}
