import { json } from '@sveltejs/kit';
import * as health from '$lib/server/services/health';

/** For whoever starts or balances the processes; open to all, so it tells states and nothing else. */
export const GET = async () => {
	const found = await health.check();
	return json(found, { status: found.ok ? 200 : 503, headers: { 'cache-control': 'no-store' } });
};
