import { print } from './print';
import type { PdfFailureCode, PdfProgress, PdfRequest } from './request';

/**
 * Entry of the child process: one request as JSON on standard input, progress as lines of JSON on standard error, the
 * file on standard output. It has neither database nor bucket and is given no settings.
 */
const say = (line: PdfProgress) => process.stderr.write(`${JSON.stringify(line)}\n`);

async function readAll(): Promise<string> {
	const chunks: Buffer[] = [];
	for await (const chunk of process.stdin) chunks.push(Buffer.from(chunk));
	return Buffer.concat(chunks).toString('utf8');
}

/** The parent is our own code and typed; only what would give a misleading file is looked at again. */
function readRequest(text: string): PdfRequest | null {
	try {
		const request = JSON.parse(text) as PdfRequest;
		const known = ['label-copy', 'product-file', 'batch-sheet'].includes(request.kind);
		return known && typeof request.data === 'object' && !Number.isNaN(Date.parse(request.creationDate))
			? request
			: null;
	} catch {
		return null;
	}
}

function giveUp(code: PdfFailureCode, message: string): void {
	say({ step: 'failed', code, message });
	process.exitCode = 1;
}

async function run(fontFolder: string | undefined): Promise<void> {
	const request = readRequest(await readAll());
	if (!request) return giveUp('badRequest', 'The request is not a document that can be printed');
	say({ step: 'layout' });
	let told = -1;
	try {
		const file = await print(request, {
			fontFolder,
			onWritten: (share) => {
				const percent = Math.floor(share * 100);
				if (percent === told) return;
				told = percent;
				say({ step: 'writing', percent });
			}
		});
		process.stdout.write(file);
	} catch (error) {
		giveUp('failed', error instanceof Error ? error.message : String(error));
	}
}

await run(process.argv[2]);
