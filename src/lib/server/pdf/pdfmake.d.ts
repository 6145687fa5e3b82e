import 'pdfmake';

/** The in-memory file system of pdfmake's server build, which its types leave out. */
declare module 'pdfmake' {
	export const virtualfs: { writeFileSync(name: string, content: Uint8Array): void };
}
