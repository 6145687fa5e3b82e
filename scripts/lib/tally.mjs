import { existsSync, readFileSync } from 'node:fs';

/** @typedef {{ passed: number, failed: number }} Tally */

/** @param {string} file */
const read = (file) => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null);

/**
 * A run that ended badly counts at least one failure, even where no single test did: a file that does not load, an
 * error outside a test, a run that was cut off.
 * @param {Tally} tally
 * @param {number} code
 * @returns {Tally}
 */
const honest = ({ passed, failed }, code) => ({ passed, failed: code !== 0 && failed === 0 ? 1 : failed });

/** @param {string} file Vitest's JSON report @param {number} code @returns {Tally} */
export function vitestTally(file, code) {
	const report = read(file);
	/** @type {{ status: string, assertionResults: { status: string }[] }[]} */
	const files = report?.testResults ?? [];
	const brokenFiles = files.filter(
		({ status, assertionResults }) =>
			status === 'failed' && !assertionResults.some((assertion) => assertion.status === 'failed')
	);
	const failed = (report?.numFailedTests ?? 0) + brokenFiles.length;
	return honest({ passed: report?.numPassedTests ?? 0, failed }, code);
}

/** @param {string} file Playwright's JSON report @param {number} code @returns {Tally} */
export function playwrightTally(file, code) {
	const report = read(file);
	const { expected = 0, unexpected = 0, flaky = 0 } = report?.stats ?? {};
	// Without retries there is no flaky test; should retries ever come, one that failed first still counts as failed.
	return honest({ passed: expected, failed: unexpected + flaky + (report?.errors?.length ?? 0) }, code);
}

/** @param {number} code @returns {Tally} */
export const oneTally = (code) => (code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 });
