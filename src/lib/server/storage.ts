import { fileURLToPath } from 'node:url';
import { join, resolve } from 'node:path';
import { settings } from './settings';
import { folderStore } from './storage/folder-store';
import { s3Place, s3Store } from './storage/s3-store';
import type { Store } from './storage/store';

const kept = new Map<string, Store>();

/** The lab's store, as STORAGE_URL names it: a folder, `file:` or `s3:`. */
export function storage(): Store {
	const url = settings().storageUrl;
	let store = kept.get(url);
	if (!store) {
		store = url.startsWith('s3:')
			? s3Store(s3Place(url), join(settings().home, 'spool'))
			: folderStore(url.startsWith('file:') ? fileURLToPath(url) : resolve(url));
		kept.set(url, store);
	}
	return store;
}

/** Where uploads in several pieces wait until they are whole. */
export function incomingFolder(): string {
	return join(settings().home, 'incoming');
}
