/** The kinds of file the evidence store takes. Inline: a browser may show it without running anything. */
export const FILE_KINDS = {
	pdf: { mediaType: 'application/pdf', extensions: ['pdf'], inline: true },
	png: { mediaType: 'image/png', extensions: ['png'], inline: true },
	jpeg: { mediaType: 'image/jpeg', extensions: ['jpg', 'jpeg'], inline: true },
	tiff: { mediaType: 'image/tiff', extensions: ['tif', 'tiff'], inline: false },
	docx: {
		mediaType: 'application/vnd.openxmlformats-officedocument.wordprocessingml.document',
		extensions: ['docx'],
		inline: false
	},
	xlsx: {
		mediaType: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
		extensions: ['xlsx'],
		inline: false
	},
	odt: { mediaType: 'application/vnd.oasis.opendocument.text', extensions: ['odt'], inline: false },
	ods: { mediaType: 'application/vnd.oasis.opendocument.spreadsheet', extensions: ['ods'], inline: false },
	csv: { mediaType: 'text/csv', extensions: ['csv', 'tsv'], inline: false },
	text: { mediaType: 'text/plain', extensions: ['txt', 'text', 'log', 'md'], inline: false }
} as const satisfies Record<string, { mediaType: string; extensions: readonly [string, ...string[]]; inline: boolean }>;

export type FileKind = keyof typeof FILE_KINDS;

export const FILE_KIND_NAMES = Object.keys(FILE_KINDS) as readonly FileKind[];

export const mediaTypeOf = (kind: FileKind): string => FILE_KINDS[kind].mediaType;

export const kindOfMediaType = (mediaType: string): FileKind | null =>
	FILE_KIND_NAMES.find((kind) => FILE_KINDS[kind].mediaType === mediaType) ?? null;

/** The ending of a file's name in lower case, without its dot; empty when there is none. */
export const extensionOf = (fileName: string): string =>
	/[^.]\.([A-Za-z0-9]{1,8})$/.exec(fileName)?.[1]?.toLowerCase() ?? '';

const endingsOf = (kind: FileKind): readonly string[] => FILE_KINDS[kind].extensions;

export const kindOfExtension = (extension: string): FileKind | null =>
	FILE_KIND_NAMES.find((kind) => endingsOf(kind).includes(extension)) ?? null;

/** Whether a name's ending belongs to the kind; a name without an ending promises nothing. */
export const nameFits = (fileName: string, kind: FileKind): boolean => {
	const extension = extensionOf(fileName);
	return extension === '' || endingsOf(kind).includes(extension);
};

/** The name with the ending of its true kind: what a download must be called to open in the right program. */
export function nameForKind(fileName: string, kind: FileKind): string {
	if (extensionOf(fileName) !== '' && nameFits(fileName, kind)) return fileName;
	const known = kindOfExtension(extensionOf(fileName)) !== null;
	const stem = known ? fileName.slice(0, fileName.lastIndexOf('.')) : fileName;
	return `${stem}.${FILE_KINDS[kind].extensions[0]}`;
}
