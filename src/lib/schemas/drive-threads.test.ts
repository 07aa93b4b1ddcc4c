import { describe, expect, it } from 'vitest';
import { DRIVE_THREADS, pitchOfThread } from './drive-threads';

describe('drive threads', () => {
	// Worked by hand: 25.4 mm divided by the threads in an inch.
	it.each([
		['0-80 UNF', 317.5],
		['00-90', 282.222],
		['000-120', 211.667],
		['1-72 UNF', 352.778],
		['2-64 UNF', 396.875],
		['M1.6 × 0.35', 350]
	])('%s moves %f µm a turn', (name, pitchUm) => {
		expect(pitchOfThread(name)).toBe(pitchUm);
	});

	it('knows no pitch of a thread it does not list', () => {
		expect(pitchOfThread('M3')).toBeNull();
	});

	it('lists every thread once', () => {
		expect(new Set(DRIVE_THREADS.map((thread) => thread.name)).size).toBe(DRIVE_THREADS.length);
	});
});
