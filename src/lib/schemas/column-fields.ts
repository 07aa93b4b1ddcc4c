import { FIELDS } from '$lib/analysis/tables/fields';
import type { DataKind } from './enumerations';

/** What a column can hold, in words with its unit. */
const WORDS: Record<string, string> = {
	t_s: 'Time, seconds',
	t_ms: 'Time, milliseconds',
	t_us: 'Time, microseconds',
	x_cm: 'x, cm',
	x_mm: 'x, mm',
	x_m: 'x, m',
	x_px: 'x, pixels',
	y_cm: 'y, cm',
	y_mm: 'y, mm',
	y_m: 'y, m',
	y_px: 'y, pixels',
	head_deg: 'Head direction, degrees',
	unit: 'Unit',
	bundle: 'Bundle',
	class: 'Class of the unit',
	amplitude_uv: 'Amplitude, µV',
	noise_uv: 'Noise, µV',
	name: 'Name of the epoch',
	kind: 'Kind of epoch',
	start_s: 'Start, seconds',
	stop_s: 'Stop, seconds'
};

/** The choices for a column of a table. */
export function fieldChoices(kind: DataKind): { value: string; label: string }[] {
	return FIELDS[kind].map(({ field }) => ({ value: field, label: WORDS[field] ?? field }));
}

export const KIND_NAMES: Record<DataKind, string> = {
	position: 'Positions',
	spikes: 'Sorted spikes',
	units: 'Facts about units',
	epochs: 'Epochs'
};
