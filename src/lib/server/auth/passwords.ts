import { hash, verify } from '@node-rs/argon2';

/** argon2id (the library's default algorithm) at the cost that common guidance names: 19 MiB, two passes. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

export const hashPassword = (password: string) => hash(password, COST);

let standIn: Promise<string> | undefined;

/** Takes as long for an unknown person as for a wrong password, so that the answer's time tells nothing. */
export async function verifyPassword(stored: string | null, password: string): Promise<boolean> {
	standIn ??= hashPassword('nobody has this password');
	const matches = await verify(stored ?? (await standIn), password);
	return stored !== null && matches;
}
