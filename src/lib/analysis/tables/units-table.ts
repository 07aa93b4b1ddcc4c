import { labelIn, numberIn } from './cells';
import { TableError } from './table-error';
import type { TableReader } from './table-reader';

export const UNIT_CLASSES = ['principal', 'interneuron', 'unclear'] as const;
export type UnitClass = (typeof UNIT_CLASSES)[number];

/** What is known of a unit besides its spikes. */
export interface UnitRow {
	readonly unit: string;
	readonly bundle: string | null;
	readonly class: UnitClass | null;
	readonly amplitudeUv: number | null;
	readonly noiseUv: number | null;
}

/**
 * Units from a table that has been read.
 * @throws TableError a class that is none, or the same unit twice
 */
export function unitsOf(reader: TableReader): UnitRow[] {
	const number = (role: string, row: number): number | null => {
		const value = numberIn(reader, role, row);
		return Number.isNaN(value) ? null : value;
	};
	const seen = new Set<string>();
	return Array.from({ length: reader.rows }, (_, row) => {
		const unit = labelIn(reader, 'unit', row);
		const bundle = labelIn(reader, 'bundle', row) || null;
		const key = `${bundle ?? ''}\n${unit}`;
		if (seen.has(key)) {
			throw new TableError('units', 'duplicate', `unit ${unit} stands twice`, row + 2, 'unit');
		}
		seen.add(key);
		return {
			unit,
			bundle,
			class: unitClass(labelIn(reader, 'class', row), row),
			amplitudeUv: number('amplitude_uv', row),
			noiseUv: number('noise_uv', row)
		};
	});
}

function unitClass(text: string, row: number): UnitClass | null {
	if (text === '') return null;
	const found = UNIT_CLASSES.find((known) => known === text.toLowerCase());
	if (found) return found;
	const reason = `"${text}" is no class; write ${UNIT_CLASSES.join(', ')} or nothing`;
	throw new TableError('units', 'not-a-kind', reason, row + 2, 'class');
}
