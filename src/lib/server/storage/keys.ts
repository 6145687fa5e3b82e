const SHA256 = /^[0-9a-f]{64}$/;
const UPLOAD_ID = /^[0-9a-f-]{36}$/;

/** Where content lies in the bucket: under its own hash, in 256 groups so that a listing stays browsable. */
export function contentKey(sha256: string): string {
	if (!SHA256.test(sha256)) throw new Error('A content key needs the 64 lower-case digits of a SHA-256.');
	return `sha256/${sha256.slice(0, 2)}/${sha256}`;
}

/** Where an upload gathers until its hash is known. */
export function uploadKey(id: string): string {
	if (!UPLOAD_ID.test(id)) throw new Error('An upload key needs the id of an upload.');
	return `upload/${id}`;
}
