import { Upload } from 'tus-js-client';

/** Pieces small enough that a lost connection costs little. */
const PIECE_BYTES = 8 * 1024 * 1024;

export type UploadState = 'sending' | 'waiting' | 'paused' | 'done' | 'failed';

/** One file on its way. */
export class SentFile {
	sentBytes = $state(0);
	state = $state<UploadState>('sending');
	/** Why it failed, in the server's words. */
	reason = $state('');
	readonly name: string;
	readonly bytes: number;
	private readonly upload: Upload;

	constructor(
		file: File,
		{ address, session, kind }: { address: string; session: string; kind: string },
		ondone: () => void
	) {
		this.name = file.name;
		this.bytes = file.size;
		this.upload = new Upload(file, {
			endpoint: address,
			chunkSize: PIECE_BYTES,
			// A tunnel or a reboot of the server: tried again for about two minutes, then by hand.
			retryDelays: [500, 1000, 2000, 4000, 8000, 16_000, 30_000, 60_000],
			metadata: { name: file.name, session, kind },
			removeFingerprintOnSuccess: true,
			onProgress: (sent) => {
				this.sentBytes = sent;
				if (this.state === 'waiting') this.state = 'sending';
			},
			onShouldRetry: (fault) => {
				const status = fault.originalResponse?.getStatus() ?? 0;
				const isRefused = status >= 400 && status < 500 && status !== 409 && status !== 423;
				if (!isRefused) this.state = 'waiting';
				return !isRefused;
			},
			onError: (fault) => {
				this.state = 'failed';
				this.reason = reasonOf(fault);
			},
			onSuccess: () => {
				this.state = 'done';
				ondone();
			}
		});
	}

	/** Goes on where an earlier try of the same file stopped, also after a reload of the page. */
	async start(): Promise<void> {
		this.state = 'sending';
		const [earlier] = await this.upload.findPreviousUploads();
		if (earlier) this.upload.resumeFromPreviousUpload(earlier);
		this.upload.start();
	}

	async pause(): Promise<void> {
		await this.upload.abort();
		this.state = 'paused';
	}

	/** Stops and clears what the server has of it. */
	async cancel(): Promise<void> {
		await this.upload.abort(true);
	}
}

function reasonOf(fault: Error): string {
	if ('originalResponse' in fault) {
		const response = fault.originalResponse as { getStatus(): number; getBody(): string } | null;
		const body = response?.getBody().trim() ?? '';
		if (response?.getStatus() === 413 && !body) return 'The file is larger than this lab takes.';
		if (body && !body.startsWith('{') && !body.startsWith('<')) return body;
		if (response) return `The server answered with status ${response.getStatus()}.`;
	}
	return 'The connection was lost and did not come back.';
}

/** Files on their way from this page, in the order they were dropped. */
export class UploadQueue {
	files = $state<SentFile[]>([]);

	constructor(
		private readonly place: { address: string; session: string; limitBytes: number },
		private readonly ondone: () => void
	) {}

	get isBusy(): boolean {
		return this.files.some(({ state }) => state === 'sending' || state === 'waiting');
	}

	/** @returns names of files that are too large and were not sent */
	add(files: Iterable<File>, kind: string): string[] {
		const tooLarge: string[] = [];
		for (const file of files) {
			if (file.size > this.place.limitBytes) {
				tooLarge.push(file.name);
				continue;
			}
			const sent = new SentFile(file, { ...this.place, kind }, () => {
				this.remove(sent);
				this.ondone();
			});
			this.files.push(sent);
			void sent.start();
		}
		return tooLarge;
	}

	async cancel(file: SentFile): Promise<void> {
		this.remove(file);
		await file.cancel();
	}

	private remove(file: SentFile): void {
		this.files = this.files.filter((other) => other !== file);
	}
}
