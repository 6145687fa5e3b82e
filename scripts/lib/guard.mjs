// Outlives whoever started it by a moment: when the starter is gone without having cleaned up (killed outright, for
// instance), the channel breaks and the guard ends what it was told of. It runs in a session of its own, so that Ctrl-C
// in the terminal does not end it first.
import { endProcess } from './ending.mjs';

/** @type {Map<number, import('./ending.mjs').Ending>} */
const guarded = new Map();

process.on('message', (/** @type {{ add?: import('./ending.mjs').Ending, remove?: number }} */ message) => {
	if (message.add) guarded.set(message.add.pid, message.add);
	if (message.remove) guarded.delete(message.remove);
});

process.on('disconnect', async () => {
	const latestFirst = [...guarded.values()].reverse();
	for (const each of latestFirst) await endProcess(each);
	process.exit(0);
});
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => undefined);
