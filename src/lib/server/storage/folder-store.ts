import { createReadStream } from 'node:fs';
import { mkdir, open, rename, rm, stat, writeFile } from 'node:fs/promises';
import { randomUUID } from 'node:crypto';
import { dirname, join } from 'node:path';
import { NotFound } from '$lib/server/errors';
import { spool } from './spool';
import { keyOf, type Store } from './store';

/** Makes a rename survive a power cut; a folder's own entry needs flushing too. */
async function flushFolder(folder: string): Promise<void> {
	const handle = await open(folder, 'r');
	try {
		await handle.sync();
	} finally {
		await handle.close();
	}
}

const isMissing = (fault: unknown) =>
	fault instanceof Error && 'code' in fault && fault.code === 'ENOENT';

/**
 * A store in a local folder. Files are written aside and renamed into place, so that a name
 * never stands for half a file.
 */
export function folderStore(root: string): Store {
	// On the same file system as the kept files: rename is atomic only there.
	const aside = join(root, '.incoming');
	const pathOf = (sha256: string) => join(root, keyOf(sha256));

	async function has(sha256: string): Promise<boolean> {
		try {
			return (await stat(pathOf(sha256))).isFile();
		} catch (fault) {
			if (isMissing(fault)) return false;
			throw fault;
		}
	}

	return {
		has,
		async put(content) {
			const { path, sha256, bytes } = await spool(content, aside);
			if (await has(sha256)) {
				await rm(path);
			} else {
				const target = pathOf(sha256);
				await mkdir(dirname(target), { recursive: true });
				await rename(path, target);
				await flushFolder(dirname(target));
			}
			return { sha256, bytes };
		},
		async read(sha256, range) {
			if (!(await has(sha256))) throw new NotFound('The original of this file is not in storage.');
			return createReadStream(pathOf(sha256), range);
		},
		async health() {
			await mkdir(aside, { recursive: true });
			const probe = join(aside, `probe-${randomUUID()}`);
			await writeFile(probe, '');
			await rm(probe);
		}
	};
}
