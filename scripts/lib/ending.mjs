import { readFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';

/** @typedef {{ pid: number, signal: NodeJS.Signals, group: boolean, patience: number }} Ending */

const STEP_MS = 25;

/**
 * When a process began, in ticks since the machine did: a number that comes back after a reboot names another process.
 * @param {number} pid
 * @returns {string | null} null when there is no such process, or only its remains
 */
export function beganAt(pid) {
	try {
		const text = readFileSync(`/proc/${pid}/stat`, 'utf8');
		const fields = text.slice(text.lastIndexOf(')') + 2).split(' ');
		return fields[0] === 'Z' ? null : (fields[19] ?? null);
	} catch {
		return null;
	}
}

/** @param {number} target a process, or a group when negative @param {NodeJS.Signals | 0} signal */
function signalTo(target, signal) {
	try {
		process.kill(target, signal);
		return true;
	} catch {
		return false;
	}
}

/**
 * Asks a process to end, waits, and ends it (and its group) outright when it has not.
 * @param {Ending} ending patience in milliseconds
 */
export async function endProcess({ pid, signal, group, patience }) {
	const target = group ? -pid : pid;
	const alive = () => (group ? signalTo(target, 0) : beganAt(pid) !== null);
	signalTo(target, signal);
	for (let waited = 0; alive() && waited < patience; waited += STEP_MS) await pause(STEP_MS);
	if (alive()) signalTo(target, 'SIGKILL');
	for (let waited = 0; alive() && waited < 2_000; waited += STEP_MS) await pause(STEP_MS);
}
