import net from 'node:net';

const HOST = '127.0.0.1';
const NEIGHBOURS = 20;

/** @param {number} port 0 lets the system choose @returns {Promise<number | null>} */
function tryPort(port) {
	return new Promise((resolve) => {
		const server = net.createServer();
		server.once('error', () => resolve(null));
		server.listen({ port, host: HOST, exclusive: true }, () => {
			const address = server.address();
			server.close(() => resolve(typeof address === 'object' && address ? address.port : null));
		});
	});
}

/**
 * The preferred port when it is free, else a neighbour, else whichever the system gives.
 * @param {number} preferred
 * @returns {Promise<number>}
 */
export async function freePort(preferred) {
	for (let port = preferred; preferred > 0 && port < preferred + NEIGHBOURS; port += 1) {
		if (await tryPort(port)) return port;
	}
	const given = await tryPort(0);
	if (given === null) throw new Error('No port is free on the loopback address.');
	return given;
}
