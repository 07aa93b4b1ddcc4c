import type { Waveform } from '../quality/best-channel';
import { labelIn, numberIn } from './cells';
import { TableError } from './table-error';
import type { TableReader } from './table-reader';

/** Mean waveform of a unit on every channel of its bundle. */
export interface MeanWaveform extends Waveform {
	readonly unit: string;
	readonly bundle: string | null;
	/** Channel labels in natural order, as the rows of `uv`. */
	readonly channelLabels: readonly string[];
}

interface Gathered {
	unit: string;
	bundle: string | null;
	/** Row of the table that holds each sample, by channel. */
	rows: Map<string, Map<number, number>>;
	lastRow: number;
}

/**
 * Mean waveforms from a table that has been read: one row a unit, channel and sample. Samples count
 * from 0 or from 1, the same for all; every channel of a unit holds the same ones.
 * @throws TableError a sample that is no whole number or stands twice, or a channel that lacks samples
 */
export function waveformsOf(reader: TableReader): MeanWaveform[] {
	const units = new Map<string, Gathered>();
	for (let row = 0; row < reader.rows; row++) gather(units, reader, row);
	return [...units.values()].map((one) => whole(one, reader));
}

function gather(units: Map<string, Gathered>, reader: TableReader, row: number): void {
	const unit = labelIn(reader, 'unit', row);
	const bundle = labelIn(reader, 'bundle', row) || null;
	const key = `${bundle ?? ''}\n${unit}`;
	const known = units.get(key) ?? { unit, bundle, rows: new Map(), lastRow: row };
	units.set(key, known);
	known.lastRow = row;
	const channel = labelIn(reader, 'channel', row);
	const samples = known.rows.get(channel) ?? new Map<number, number>();
	known.rows.set(channel, samples);
	const sample = numberIn(reader, 'sample', row);
	if (!Number.isInteger(sample) || sample < 0) {
		refuse('not-a-number', `sample ${sample} is no whole number from 0`, row, 'sample');
	}
	if (samples.has(sample)) {
		const reason = `sample ${sample} of unit ${unit} stands twice on channel ${channel}`;
		refuse('duplicate', reason, row, 'sample');
	}
	samples.set(sample, row);
}

function whole({ unit, bundle, rows, lastRow }: Gathered, reader: TableReader): MeanWaveform {
	const channelLabels = [...rows.keys()].sort((a, b) =>
		a.localeCompare(b, 'en', { numeric: true })
	);
	const lengths = [...rows.values()].map(({ size }) => size);
	const length = Math.max(...lengths);
	const first = Math.min(...[...rows.values()].flatMap((samples) => [...samples.keys()]));
	const uv = new Float64Array(channelLabels.length * length);
	channelLabels.forEach((channel, c) => {
		for (let k = 0; k < length; k++) {
			const row = rows.get(channel)?.get(first + k);
			if (row === undefined) {
				const reason = `unit ${unit} has no sample ${first + k} on channel ${channel}; every channel needs the same ${length} samples without a gap`;
				refuse('ragged', reason, lastRow, 'sample');
			}
			uv[c * length + k] = numberIn(reader, 'uv', row);
		}
	});
	return { unit, bundle, channelLabels, channels: channelLabels.length, uv };
}

function refuse(
	code: 'not-a-number' | 'duplicate' | 'ragged',
	reason: string,
	row: number,
	column: string
): never {
	throw new TableError('waveforms', code, reason, row + 2, column);
}
