import { paths } from '../paths';

/** What `GET /api/jobs/[id]` says. */
export interface JobReport {
	readonly state: 'waiting' | 'running' | 'done' | 'failed';
	readonly done: number;
	readonly total: number;
	readonly note?: string | null;
	readonly resultHref?: string | null;
}

const FINAL = new Set<JobReport['state']>(['done', 'failed']);
const EVERY_MS = 1000;

/** Asks after a job until it ends. A lost connection is told and asked again: the work goes on without the page. */
export class JobWatch {
	report = $state.raw<JobReport | null>(null);
	lost = $state(false);

	watch(id: string, ondone?: (report: JobReport) => void): () => void {
		const stop = new AbortController();
		let timer: ReturnType<typeof setTimeout>;
		const ask = async () => {
			try {
				const response = await fetch(paths.api.job(id), { signal: stop.signal });
				if (!response.ok) throw new Error(String(response.status));
				this.report = (await response.json()) as JobReport;
				this.lost = false;
			} catch {
				if (stop.signal.aborted) return;
				this.lost = true;
			}
			if (this.report && FINAL.has(this.report.state)) ondone?.(this.report);
			else timer = setTimeout(ask, EVERY_MS);
		};
		void ask();
		return () => {
			stop.abort();
			clearTimeout(timer);
		};
	}
}
