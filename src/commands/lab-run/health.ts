import { setTimeout as sleep } from 'node:timers/promises';
import { Refusal } from '../bootstrap/refusal.mjs';

const PATIENCE_MS = 120_000;

/** Waits until the web process says that all it needs is there. */
export async function waitForHealth(address: string): Promise<void> {
	const until = Date.now() + PATIENCE_MS;
	let last = 'no answer';
	while (Date.now() < until) {
		try {
			const answer = await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(5_000) });
			last = await answer.text();
			if (answer.ok) return;
		} catch (error) {
			last = error instanceof Error ? error.message : String(error);
		}
		await sleep(100);
	}
	throw new Refusal(
		`The web process did not become healthy within ${PATIENCE_MS / 1000} s. The records are safe. Its last answer: ${last}`
	);
}
