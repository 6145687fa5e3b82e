import { execFile } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';

const run = promisify(execFile);

/** For tests: the text of each page as a reader's tool sees it, in reading order unless `layout` is asked for. */
export async function pagesOf(file: Uint8Array, layout = false): Promise<readonly string[]> {
	const folder = await mkdtemp(join(tmpdir(), 'costmary-print-'));
	try {
		const path = join(folder, 'file.pdf');
		await writeFile(path, file);
		const { stdout } = await run('pdftotext', [...(layout ? ['-layout'] : []), path, '-'], { maxBuffer: 64 << 20 });
		// Each page ends with a form feed; the tool writes the micro sign in one of its two forms.
		return stdout.normalize('NFKC').split('\f').slice(0, -1);
	} finally {
		await rm(folder, { recursive: true, force: true });
	}
}

export const asOneLine = (text: string) => text.replace(/\s+/g, ' ').trim();
