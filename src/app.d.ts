import type { Actor } from '$lib/server/access/actor';
import type { RefusalCode, RefusalData } from '$lib/server/refused';

declare global {
	namespace App {
		interface Error {
			message: string;
			code?: RefusalCode;
			data?: RefusalData;
			errorId?: string;
		}
		interface Locals {
			requestId: string;
			actor: Actor | null;
			sessionId: string | null;
			theme: 'light' | 'dark' | 'system';
			language: 'en';
		}
		namespace Superforms {
			type Message =
				| { kind: 'refused'; code: RefusalCode; data: RefusalData }
				| { kind: 'done'; code: string; data?: Record<string, unknown> };
		}
	}
}

export {};
