import type { TableKind } from './table-error';

/** What a column can hold. Columns of the same role exclude each other. */
export interface FieldSpec {
	readonly field: string;
	/** What the numbers are for, whatever their unit: `t`, `x`, `y` … */
	readonly role: string;
	readonly type: 'number' | 'label';
	readonly isRequired: boolean;
	/** A cell may be empty; it reads as NaN or ''. */
	readonly mayBeEmpty: boolean;
	/** Turns the unit of the column into the product's: value · factor / divisor. */
	readonly factor: number;
	readonly divisor: number;
	/** Other headers that surely mean this. */
	readonly aliases: readonly string[];
	/** Headers that may mean this: offered to a person, never taken silently. */
	readonly guesses: readonly string[];
}

const number = (
	field: string,
	role: string,
	isRequired: boolean,
	more: Partial<FieldSpec> = {}
): FieldSpec => ({
	field,
	role,
	type: 'number',
	isRequired,
	mayBeEmpty: false,
	factor: 1,
	divisor: 1,
	aliases: [],
	guesses: [],
	...more
});

const label = (
	field: string,
	isRequired: boolean,
	mayBeEmpty: boolean,
	guesses: readonly string[] = []
): FieldSpec => ({
	...number(field, field, isRequired),
	type: 'label',
	mayBeEmpty,
	guesses
});

const TIMES: readonly FieldSpec[] = [
	number('t_s', 't', true, {
		aliases: ['time_s', 'timestamp_s', 'seconds'],
		guesses: ['t', 'time', 'times', 'timestamp', 'timestamps', 'ts', 'spike_time', 'spike_times']
	}),
	number('t_ms', 't', true, { aliases: ['time_ms', 'timestamp_ms'], divisor: 1000 }),
	number('t_us', 't', true, { aliases: ['time_us', 'timestamp_us'], divisor: 1_000_000 })
];

const along = (axis: 'x' | 'y', isRequired: boolean): readonly FieldSpec[] => [
	number(`${axis}_cm`, axis, isRequired, { guesses: [axis, `pos_${axis}`, `${axis}_pos`] }),
	number(`${axis}_mm`, axis, isRequired, { divisor: 10 }),
	number(`${axis}_m`, axis, isRequired, { factor: 100 }),
	number(`${axis}_px`, axis, isRequired, { aliases: [`${axis}_pixel`, `${axis}_pixels`] })
];

/** Other words for a bundle. */
const GROUPS = ['tetrode', 'shank', 'electrode', 'group'];
const UNIT = label('unit', true, false, ['unit_id', 'cell', 'cell_id', 'neuron']);
const BUNDLE = label('bundle', false, true, GROUPS);

/** Most dimensions of a feature space: f1 … f64. */
export const MOST_FEATURES = 64;

/** The columns of each table. */
export const FIELDS: Readonly<Record<TableKind, readonly FieldSpec[]>> = {
	position: [
		...TIMES,
		...along('x', true),
		...along('y', false),
		number('head_deg', 'head', false, { mayBeEmpty: true, guesses: ['head', 'heading', 'angle'] })
	],
	spikes: [
		label('unit', true, false, ['unit_id', 'cell', 'cell_id', 'neuron', 'cluster', 'cluster_id']),
		...TIMES,
		BUNDLE
	],
	units: [
		UNIT,
		BUNDLE,
		label('class', false, true, ['type', 'cell_type']),
		number('amplitude_uv', 'amplitude_uv', false, { mayBeEmpty: true, guesses: ['amplitude'] }),
		number('noise_uv', 'noise_uv', false, { mayBeEmpty: true, guesses: ['noise'] })
	],
	waveforms: [
		UNIT,
		BUNDLE,
		label('channel', true, false, ['wire', 'site']),
		number('sample', 'sample', true, { guesses: ['point'] }),
		number('uv', 'uv', true, { aliases: ['mean_uv'], guesses: ['value', 'voltage'] })
	],
	features: [
		...TIMES,
		label('bundle', true, false, GROUPS),
		label('unit', true, true, ['unit_id', 'cell', 'cell_id', 'neuron', 'cluster', 'cluster_id']),
		...Array.from({ length: MOST_FEATURES }, (_, k) =>
			number(`f${k + 1}`, `f${k + 1}`, k === 0, { aliases: [`feature_${k + 1}`] })
		)
	],
	epochs: [
		label('name', true, true, ['epoch', 'label']),
		label('kind', true, false, ['type']),
		number('start_s', 'start_s', true, { guesses: ['start', 'start_time', 'begin'] }),
		number('stop_s', 'stop_s', true, { guesses: ['stop', 'stop_time', 'end'] })
	]
};

/** A header as it is compared: lower case, everything but letters and digits one underscore. */
export function plainHeader(header: string): string {
	return header
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '_')
		.replace(/^_|_$/g, '');
}
