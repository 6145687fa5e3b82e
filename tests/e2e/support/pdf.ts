import { execFile } from 'node:child_process';
import { promisify } from 'node:util';

const run = promisify(execFile);
const LARGEST = 64 * 1024 * 1024;

/**
 * The text a reader of the file sees. Compatibility forms are folded: a micro sign may come out as the Greek letter.
 * @param file where a download was saved
 */
export async function pdfText(file: string): Promise<string> {
	const { stdout } = await run('pdftotext', ['-layout', '-enc', 'UTF-8', file, '-'], { maxBuffer: LARGEST });
	return stdout.normalize('NFKC');
}

/** @throws with qpdf's words when the file is damaged */
export async function checkPdf(file: string): Promise<void> {
	await run('qpdf', ['--check', file], { maxBuffer: LARGEST });
}

export async function pdfPages(file: string): Promise<number> {
	const { stdout } = await run('qpdf', ['--show-npages', file]);
	return Number(stdout);
}
