/** Where a pitch comes from. */
export type PitchSource = 'standard' | 'memory';

/** A thread that drives are built with. */
export interface ScrewPitch {
	readonly name: string;
	/** Travel of one turn. */
	readonly pitchUm: number;
	/**
	 * `standard`: read in a published thread series. `memory`: the thread is named for its count per
	 * inch, but the count was not checked in a standard.
	 */
	readonly source: PitchSource;
}

/** Pitch of a thread counted per inch; an inch is 25.4 mm exactly. Not rounded. */
export function pitchPerInch(threads: number): number {
	if (!(threads > 0)) throw new RangeError(`threads per inch must be above 0, got ${threads}`);
	return 25_400 / threads;
}

/**
 * Usual threads: unified fine threads by their count per inch, metric ones by ISO 261 and ISO 262.
 * A design takes its pitch from here once and each implant from its design at surgery: a depth is
 * never worked out from this table.
 */
export const SCREW_PITCHES: readonly ScrewPitch[] = [
	{ name: '0-80 UNF', pitchUm: pitchPerInch(80), source: 'standard' },
	{ name: '00-90', pitchUm: pitchPerInch(90), source: 'memory' },
	{ name: '000-120', pitchUm: pitchPerInch(120), source: 'memory' },
	{ name: '1-72 UNF', pitchUm: pitchPerInch(72), source: 'standard' },
	{ name: '2-64 UNF', pitchUm: pitchPerInch(64), source: 'standard' },
	{ name: 'M1 × 0.25', pitchUm: 250, source: 'standard' },
	{ name: 'M1.2 × 0.25', pitchUm: 250, source: 'standard' },
	{ name: 'M1.4 × 0.3', pitchUm: 300, source: 'standard' },
	{ name: 'M1.6 × 0.35', pitchUm: 350, source: 'standard' },
	{ name: 'M2 × 0.4', pitchUm: 400, source: 'standard' },
	{ name: 'M1–M1.8 × 0.2 fine', pitchUm: 200, source: 'standard' }
];
