import { expect, test } from 'vitest';
import { extensionOf, nameForKind } from './kinds';

test.each([
	['a.PDF', 'pdf'],
	['a.tar.gz', 'gz'],
	['.pdf', ''],
	['none', ''],
	['a.', '']
])('the ending of %s is %j', (name, extension) => expect(extensionOf(name)).toBe(extension));

test.each([
	['report.pdf', 'pdf', 'report.pdf'],
	['photo.JPEG', 'jpeg', 'photo.JPEG'],
	['report.pdf', 'xlsx', 'report.xlsx'],
	['report', 'pdf', 'report.pdf'],
	['batch.07', 'pdf', 'batch.07.pdf']
] as const)('%s that is a %s is called %s', (name, kind, called) => expect(nameForKind(name, kind)).toBe(called));
