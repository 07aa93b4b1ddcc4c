import type { Worth } from './history';

/**
 * The worth of a bundle: the latest figure of each arena within the last days, and of these the best,
 * since a bundle that still serves one arena is still of use.
 * @param days today and the days before it that count, ≥ 1
 * @returns null when nothing was decoded in them
 */
export function bestWorth(worths: readonly Worth[], today: number, days: number): Worth | null {
	const latest = new Map<string, Worth>();
	for (const worth of worths) {
		if (worth.day > today || worth.day <= today - days) continue;
		const known = latest.get(worth.arena);
		if (!known || worth.day >= known.day) latest.set(worth.arena, worth);
	}
	let best: Worth | null = null;
	for (const worth of latest.values()) if (!best || worth.bits > best.bits) best = worth;
	return best;
}

/**
 * How much the worth fell from the days before to the last ones, bits a window; NaN when either is
 * unknown, negative when it rose.
 */
export function worthFall(worths: readonly Worth[], today: number, days: number): number {
	const now = bestWorth(worths, today, days);
	const before = bestWorth(worths, today - days, days);
	return now && before ? before.bits - now.bits : NaN;
}
