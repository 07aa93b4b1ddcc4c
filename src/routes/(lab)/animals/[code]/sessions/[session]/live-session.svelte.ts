import type { AnalysisSummary } from '$lib/server/services/session-views';

const POLL_MS = 2000;

/**
 * Follows one analysis until it ends: by server-sent events, and by asking every two seconds where
 * those do not come through.
 */
export class LiveAnalysis {
	state = $state<AnalysisSummary['state']>('queued');
	progress = $state(0);
	private source: EventSource | undefined;
	private timer: ReturnType<typeof setInterval> | undefined;
	private isReading = false;

	constructor(
		private readonly addresses: { events: string; standing: string },
		private readonly id: string,
		private readonly onended: () => void
	) {}

	/** @returns stops following */
	follow(from: Pick<AnalysisSummary, 'state' | 'progress'>): () => void {
		this.state = from.state;
		this.progress = from.progress;
		this.source = new EventSource(this.addresses.events);
		this.source.addEventListener('analysis', ({ data }) => {
			if (data === this.id) void this.read();
		});
		this.source.addEventListener('again', () => void this.read());
		this.source.addEventListener('open', () => this.stopAsking());
		this.source.addEventListener('error', () => this.ask());
		return () => this.stop();
	}

	private ask(): void {
		this.timer ??= setInterval(() => void this.read(), POLL_MS);
	}

	private stopAsking(): void {
		clearInterval(this.timer);
		this.timer = undefined;
	}

	private stop(): void {
		this.source?.close();
		this.stopAsking();
	}

	private async read(): Promise<void> {
		if (this.isReading) return;
		this.isReading = true;
		try {
			const answer = await fetch(this.addresses.standing);
			if (!answer.ok) throw new Error(`status ${answer.status}`);
			const standing: AnalysisSummary = await answer.json();
			this.state = standing.state;
			this.progress = standing.progress;
			if (standing.state === 'done' || standing.state === 'failed') {
				this.stop();
				this.onended();
			}
		} catch {
			// Away for the moment; the next event or the next question tells.
			this.ask();
		} finally {
			this.isReading = false;
		}
	}
}
