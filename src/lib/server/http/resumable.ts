import { AsyncLocalStorage } from 'node:async_hooks';
import { FileStore } from '@tus/file-store';
import { Server } from '@tus/server';
import { DATA_KINDS, type DataKind } from '$lib/schemas/enumerations';
import { demand, personOf, type Actor } from '$lib/server/access';
import { NotFound, Refusal } from '$lib/server/errors';
import * as dataFiles from '$lib/server/services/data-files';
import * as sessions from '$lib/server/services/sessions';
import { settings } from '$lib/server/settings';
import { incomingFolder } from '$lib/server/storage';

/** An upload that nobody went on with is cleared away after this long. */
const KEPT_MS = 3 * 24 * 3600 * 1000;
const CLEAR_EVERY_MS = 3600 * 1000;

const kept = globalThis as typeof globalThis & { quarterturnTus?: { tus: Server; folder: string } };
const caller = new AsyncLocalStorage<Actor>();
let clearedAt = -Infinity;

const asKind = (kind: string | null | undefined): DataKind | null =>
	DATA_KINDS.find((known) => known === kind) ?? null;

/** What tus answers for a refusal: its status and its sentence. */
function answered(fault: unknown): { status_code: number; body: string } | undefined {
	return fault instanceof Refusal ? { status_code: fault.status, body: fault.message } : undefined;
}

function server(): Server {
	const folder = incomingFolder();
	if (kept.quarterturnTus?.folder === folder) return kept.quarterturnTus.tus;
	const store = new FileStore({ directory: folder, expirationPeriodInMilliseconds: KEPT_MS });
	const tus = new Server({
		path: '/uploads',
		datastore: store,
		relativeLocation: true,
		maxSize: () => settings().uploadLimitBytes,
		/** An upload belongs to one person and one session; both are written down by the server. */
		async onUploadCreate(_request, upload) {
			const by = caller.getStore() ?? null;
			demand(by, 'sessions.write');
			const sessionId = upload.metadata?.session ?? '';
			await sessions.get(by, sessionId);
			return { metadata: { ...upload.metadata, owner: personOf(by) } };
		},
		async onIncomingRequest(request, id) {
			if (request.method === 'POST' || request.method === 'OPTIONS') return;
			const upload = await store.getUpload(id);
			if (upload.metadata?.owner !== caller.getStore()?.personId) throw new NotFound();
		},
		async onUploadFinish(_request, upload) {
			const { session = '', name, kind } = upload.metadata ?? {};
			try {
				const file = await dataFiles.receive(caller.getStore() ?? null, {
					sessionId: session ?? '',
					kind: asKind(kind),
					name: name ?? 'unnamed',
					content: store.read(upload.id)
				});
				return { status_code: 200, headers: { 'quarterturn-file': file.id } };
			} finally {
				// Also after a failure: a browser that asks again then begins anew instead of
				// finding a finished upload that never became a file.
				await store.remove(upload.id);
			}
		},
		onResponseError: (_request, fault) => answered(fault)
	});
	kept.quarterturnTus = { tus, folder };
	return tus;
}

/** Answers one request of the tus protocol (1.0.0) for the person who acts. */
export async function resumable(by: Actor | null, request: Request): Promise<Response> {
	demand(by, 'sessions.write');
	const tus = server();
	if (performance.now() - clearedAt > CLEAR_EVERY_MS) {
		clearedAt = performance.now();
		await tus.cleanUpExpiredUploads();
	}
	return caller.run(by, () => tus.handleWeb(request));
}
