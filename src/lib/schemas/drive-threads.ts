/** A thread drives are built with. `pitchUm` is the travel of one turn. */
export interface DriveThread {
	name: string;
	pitchUm: number;
}

/** Threads counted per inch; an inch is 25.4 mm exactly. Rounded as the record keeps it. */
const perInch = (threads: number) => Math.round(25_400_000 / threads) / 1000;

/**
 * The usual threads. Unified miniature and fine threads by their count per inch; metric ones by
 * ISO 261 and ISO 262 (general plan and selected sizes). 00-90 and 000-120 are named for their
 * count but written from memory, not checked in a standard.
 */
export const DRIVE_THREADS: DriveThread[] = [
	{ name: '0-80 UNF', pitchUm: perInch(80) },
	{ name: '00-90', pitchUm: perInch(90) },
	{ name: '000-120', pitchUm: perInch(120) },
	{ name: '1-72 UNF', pitchUm: perInch(72) },
	{ name: '2-64 UNF', pitchUm: perInch(64) },
	{ name: 'M1 × 0.25', pitchUm: 250 },
	{ name: 'M1.2 × 0.25', pitchUm: 250 },
	{ name: 'M1.4 × 0.3', pitchUm: 300 },
	{ name: 'M1.6 × 0.35', pitchUm: 350 },
	{ name: 'M1–M1.8 × 0.2 fine', pitchUm: 200 }
];

export function pitchOfThread(name: string): number | null {
	return DRIVE_THREADS.find((thread) => thread.name === name)?.pitchUm ?? null;
}
