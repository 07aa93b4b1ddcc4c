import pg from 'pg';
import { z } from 'zod';
import { demand, type Actor } from '$lib/server/access';
import { settings } from '$lib/server/settings';
import * as sessions from './sessions';

const CHANNEL = 'quarterturn_live';
const RETRY_MS = 1000;

/** What the database tells: ids only. Whoever listens reads the rows with their own permissions. */
const noteSchema = z.object({
	kind: z.literal('analysis'),
	id: z.uuid(),
	sessionId: z.uuid()
});
export type LiveNote = z.infer<typeof noteSchema>;

/**
 * `again` after a lost connection: something may have been missed, so read everything anew.
 * `end` when the process stops.
 */
type Listener = (note: LiveNote | 'again' | 'end') => void;

class Ear {
	private readonly listeners = new Map<string, Set<Listener>>();
	private client: pg.Client | undefined;
	private timer: NodeJS.Timeout | undefined;
	private isOpen = false;

	add(sessionId: string, listener: Listener): () => void {
		const here = this.listeners.get(sessionId) ?? new Set();
		this.listeners.set(sessionId, here.add(listener));
		if (!this.isOpen) {
			this.isOpen = true;
			this.connect();
		}
		return () => {
			here.delete(listener);
			if (here.size === 0) this.listeners.delete(sessionId);
			if (this.listeners.size === 0) this.close();
		};
	}

	close(): void {
		this.isOpen = false;
		clearTimeout(this.timer);
		this.client?.end().catch(() => undefined);
		this.client = undefined;
	}

	end(): void {
		this.tellAll('end');
		this.listeners.clear();
		this.close();
	}

	private connect(): void {
		const client = new pg.Client({
			connectionString: settings().databaseUrl,
			application_name: 'quarterturn-live',
			keepAlive: true
		});
		this.client = client;
		// The end of the connection follows every error and is handled there.
		client.on('error', () => undefined);
		client.on('end', () => this.again(client));
		client.on('notification', ({ payload }) => this.tell(payload ?? ''));
		client
			.connect()
			.then(() => client.query(`LISTEN ${CHANNEL}`))
			.then(() => this.tellAll('again'))
			.catch(() => this.again(client));
	}

	private again(client: pg.Client): void {
		if (!this.isOpen || this.client !== client) return;
		this.client = undefined;
		this.timer = setTimeout(() => this.connect(), RETRY_MS);
	}

	private tell(payload: string): void {
		const note = noteSchema.safeParse(JSON.parse(payload));
		if (!note.success) return;
		for (const listener of this.listeners.get(note.data.sessionId) ?? []) listener(note.data);
	}

	private tellAll(word: 'again' | 'end'): void {
		for (const here of [...this.listeners.values()])
			for (const listener of [...here]) listener(word);
	}
}

const kept = globalThis as typeof globalThis & { quarterturnEar?: Ear };

/**
 * Hears of every change to the analyses of a session. One connection a process serves all pages.
 * @returns stops listening
 */
export async function listen(
	by: Actor | null,
	sessionId: string,
	{ animal }: { animal?: string },
	listener: Listener
): Promise<() => void> {
	demand(by, 'data.read');
	await sessions.get(by, sessionId, { animal });
	kept.quarterturnEar ??= new Ear();
	return kept.quarterturnEar.add(sessionId, listener);
}

/** Ends every page's line, so that a stopping server need not wait for them. */
export function closeLive(): void {
	kept.quarterturnEar?.end();
	kept.quarterturnEar = undefined;
}
