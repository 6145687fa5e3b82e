/** The error codes this bucket speaks, with the status a real bucket answers for each. */
const STATUS = {
	AccessDenied: 403,
	AccessForbidden: 403,
	AuthorizationHeaderMalformed: 400,
	AuthorizationQueryParametersError: 400,
	BadDigest: 400,
	EntityTooLarge: 400,
	EntityTooSmall: 400,
	IncompleteBody: 400,
	InternalError: 500,
	InvalidAccessKeyId: 403,
	InvalidArgument: 400,
	InvalidDigest: 400,
	InvalidPart: 400,
	InvalidPartOrder: 400,
	InvalidRange: 416,
	InvalidRequest: 400,
	InvalidURI: 400,
	KeyTooLongError: 400,
	MalformedTrailerError: 400,
	MalformedXML: 400,
	MethodNotAllowed: 405,
	MissingContentLength: 411,
	NoSuchBucket: 404,
	NoSuchKey: 404,
	NoSuchUpload: 404,
	NotImplemented: 501,
	NotModified: 304,
	PreconditionFailed: 412,
	RequestTimeTooSkewed: 403,
	ServiceUnavailable: 503,
	SignatureDoesNotMatch: 403,
	SlowDown: 503,
	XAmzContentSHA256Mismatch: 400
} as const;

export type ProblemCode = keyof typeof STATUS;

export const isProblemCode = (code: string): code is ProblemCode => Object.hasOwn(STATUS, code);

/** A refusal in the bucket's own words; anything else thrown is a fault of the stand-in and answers 500. */
export class Problem extends Error {
	readonly code: ProblemCode;
	readonly status: number;

	constructor(code: ProblemCode, message: string) {
		super(message);
		this.code = code;
		this.status = STATUS[code];
	}
}
