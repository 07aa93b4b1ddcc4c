/** A place where a cell fires, as a Gaussian bump. Without `yCm` it lies on a track. */
export interface TrueField {
	readonly xCm: number;
	readonly yCm: number | null;
	readonly sigmaCm: number;
	readonly peakHz: number;
	/** The heading it fires on; 0 for both. */
	readonly heading: -1 | 0 | 1;
}

/** What a simulated cell truly does on one day in one arena. */
export interface TrueCell {
	/** The same cell keeps its name over days; no file tells it. */
	readonly name: string;
	readonly bundle: string;
	readonly kind: 'principal' | 'interneuron';
	readonly baseHz: number;
	readonly fields: readonly TrueField[];
	readonly amplitudeUv: number;
}

/** Firing against the heading a field prefers, as a share of its peak. */
const OTHER_WAY = 0.15;

/** Firing rate at a place; `heading` 0 counts as either way. */
export function rateHz(cell: TrueCell, xCm: number, yCm: number, heading: number): number {
	let rate = cell.baseHz;
	for (const field of cell.fields) {
		const dx = xCm - field.xCm;
		const dy = field.yCm === null ? 0 : yCm - field.yCm;
		const bump = Math.exp(-(dx * dx + dy * dy) / (2 * field.sigmaCm * field.sigmaCm));
		const isAgainst = field.heading !== 0 && heading === -field.heading;
		rate += field.peakHz * bump * (isAgainst ? OTHER_WAY : 1);
	}
	return rate;
}

/** Largest rate the cell can reach anywhere, or a little more. */
export function ceilingHz(cell: TrueCell): number {
	return cell.fields.reduce((sum, field) => sum + field.peakHz, cell.baseHz);
}
