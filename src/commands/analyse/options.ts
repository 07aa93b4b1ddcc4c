import { parseArgs } from 'node:util';
import type { GivenParameters, SessionParameters } from '../../lib/analysis/session/parameters';
import { Unusable } from './unusable';

/** What was asked for on the command line. */
export interface AnalyseOptions {
	readonly position: string;
	readonly spikes: string;
	readonly units?: string;
	readonly waveforms?: string;
	/** Samples per second of the waveforms. */
	readonly waveformHz?: number;
	readonly features?: string;
	readonly epochs?: string;
	/** A path, or '-' for standard output; a readable table when absent. */
	readonly json?: string;
	readonly pxPerCm?: number;
	readonly parameters: GivenParameters;
}

const NUMBERS = {
	'bin-cm': 'binCm',
	'smooth-cm': 'smoothCm',
	'min-speed-cm-s': 'minSpeedCmS',
	'min-occupancy-s': 'minOccupancyS',
	'window-ms': 'windowMs',
	folds: 'folds',
	shuffles: 'shuffles',
	seed: 'seed'
} as const satisfies Record<string, keyof SessionParameters>;

const NOT_YET = ['nwb'] as const;

const TEXTS = [
	'position',
	'spikes',
	'arena',
	'units',
	'waveforms',
	'waveform-hz',
	'features',
	'epochs',
	'json',
	'px-per-cm',
	'prior',
	...(Object.keys(NUMBERS) as (keyof typeof NUMBERS)[]),
	...NOT_YET
] as const;

/** Name of the option that sets a parameter. */
export function optionOf(field: keyof SessionParameters): string {
	const numeric = Object.entries(NUMBERS).find(([, name]) => name === field);
	return `--${numeric ? numeric[0] : field}`;
}

/**
 * Reads the command line.
 * @throws Unusable with one line that says what is wrong
 */
export function readOptions(args: string[]): AnalyseOptions {
	const given = parsed(args);
	const early = NOT_YET.find((name) => given[name] !== undefined);
	if (early) {
		throw new Unusable(
			`--${early} comes in a later version; this one reads tables: --position, --spikes, --units, --waveforms, --features and --epochs`
		);
	}
	const { position, spikes, arena, prior } = given;
	if (!position) throw new Unusable('--position is missing: the table of positions');
	if (!spikes) throw new Unusable('--spikes is missing: the table of spikes');
	if (!arena) throw new Unusable('--arena is missing, for example --arena straight:300');
	if (prior !== undefined && prior !== 'even' && prior !== 'time-spent') {
		throw new Unusable(`--prior: must be even or time-spent, got ${prior}`);
	}
	const numbers: Partial<Record<(typeof NUMBERS)[keyof typeof NUMBERS], number>> = {};
	for (const [name, field] of Object.entries(NUMBERS) as [
		keyof typeof NUMBERS,
		(typeof NUMBERS)[keyof typeof NUMBERS]
	][]) {
		if (given[name] !== undefined) numbers[field] = number(name, given[name]);
	}
	const pxPerCm = positive('px-per-cm', given['px-per-cm']);
	const waveformHz = positive('waveform-hz', given['waveform-hz']);
	if ((given.waveforms === undefined) !== (waveformHz === undefined)) {
		throw new Unusable('--waveforms and --waveform-hz go together');
	}
	return {
		position,
		spikes,
		units: given.units,
		waveforms: given.waveforms,
		waveformHz,
		features: given.features,
		epochs: given.epochs,
		json: given.json,
		pxPerCm,
		parameters: { arena, prior, ...numbers }
	};
}

function parsed(args: string[]): Partial<Record<(typeof TEXTS)[number], string>> {
	try {
		const options = Object.fromEntries(TEXTS.map((name) => [name, { type: 'string' as const }]));
		return parseArgs({ args, options, strict: true }).values;
	} catch (error) {
		if (error instanceof TypeError) throw new Unusable(error.message.split(/\.\s|\n/)[0]);
		throw error;
	}
}

function positive(name: string, text: string | undefined): number | undefined {
	if (text === undefined) return undefined;
	const value = number(name, text);
	if (!(value > 0)) throw new Unusable(`--${name}: must be above 0`);
	return value;
}

function number(name: string, text: string): number {
	const value = Number(text);
	if (text.trim() === '' || !Number.isFinite(value)) {
		throw new Unusable(`--${name}: "${text}" is not a number`);
	}
	return value;
}
