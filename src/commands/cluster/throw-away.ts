import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { openHome, type Home } from '../home/home';
import { openCluster, type Cluster } from './cluster';
import { knownPlace } from './place';

/** A home in the system's temporary folder. */
export function makeThrowAwayHome(purpose: string): Home {
	const folder = mkdtempSync(join(tmpdir(), `quarterturn-${purpose}-`));
	chmodSync(folder, 0o711);
	return openHome(folder);
}

/** Deletes a home of the temporary folder with its cluster; any other is somebody's and stays. */
export function removeHome(home: Home): void {
	if (!home.folder.startsWith(join(tmpdir(), 'quarterturn-'))) return;
	const place = knownPlace(home);
	if (place) rmSync(place.folder, { recursive: true, force: true });
	rmSync(home.folder, { recursive: true, force: true });
}

/** A cluster for one test run; stopping it deletes it. */
export async function openThrowAwayCluster(purpose: string): Promise<Cluster & { home: Home }> {
	const home = makeThrowAwayHome(purpose);
	const cluster = await openCluster(home, true);
	return {
		...cluster,
		home,
		async stop() {
			await cluster.stop();
			removeHome(home);
		}
	};
}
