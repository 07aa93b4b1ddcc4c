import { systemActor } from '$lib/server/access';
import { setClock } from '$lib/server/clock';
import { record } from '$lib/server/record';
import * as labSettings from '$lib/server/services/lab-settings';

/** A lab in UTC whose clock stands still; days begin at 04:00. Returns the way back. */
export async function holdLabAt(moment: string): Promise<() => void> {
	const by = systemActor();
	const lab = { name: 'Lab', timeZone: 'UTC', dayStartsAt: '04:00', isDemo: false };
	await record(by, (w) => labSettings.put(w, by, 'lab', lab));
	return setClock(() => new Date(moment));
}
