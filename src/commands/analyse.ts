import { rename, rm, writeFile } from 'node:fs/promises';
import process from 'node:process';
import { analyseSession } from '../lib/analysis/session/analyse';
import { analysisResult, type AnalysisResult } from '../lib/analysis/session/analysis-result';
import { ParameterError, sessionParameters } from '../lib/analysis/session/parameters';
import { withBundles } from '../lib/analysis/session/with-bundles';
import {
	readEpochs,
	readFeatures,
	readPosition,
	readSpikes,
	readUnits,
	readWaveforms
} from '../lib/analysis/tables/read-session-tables';
import { TableError } from '../lib/analysis/tables/table-error';
import { ANALYSIS_VERSION } from '../lib/analysis/version';
import { fromWhereTyped, readHashed, reasonOf } from './analyse/hashed-file';
import { optionOf, readOptions, type AnalyseOptions } from './analyse/options';
import { readable } from './analyse/readable';
import { Unusable } from './analyse/unusable';

const UNUSABLE = 2;

/** Analyses one session from files, with no server and no database. */
async function analyse(options: AnalyseOptions): Promise<AnalysisResult> {
	const startedAt = new Date();
	const parameters = sessionParameters(options.parameters);
	const { pxPerCm } = options;
	const position = await readHashed(options.position, (chunks) =>
		readPosition(chunks, { pxPerCm })
	);
	const spikes = await readHashed(options.spikes, (chunks) => readSpikes(chunks));
	const rows = await optional(options.units, readUnits);
	const waveforms = await optional(options.waveforms, readWaveforms);
	const features = await optional(options.features, readFeatures);
	const epochs = await optional(options.epochs, readEpochs);
	const units = withBundles(spikes.value.units, rows);
	const evidence = { rows, waveforms, waveformHz: options.waveformHz ?? null, features };
	const { result } = analyseSession(
		{ position: position.value, units, epochs, evidence },
		parameters
	);
	return analysisResult(
		{ ...result, warnings: [...spikes.value.warnings, ...result.warnings] },
		{
			positionSha256: position.sha256,
			spikesSha256: spikes.sha256,
			codeVersion: ANALYSIS_VERSION,
			startedAt: startedAt.toISOString(),
			elapsedS: (Date.now() - startedAt.getTime()) / 1000
		}
	);
}

/** The rows of a table that may be left out. */
async function optional<Row>(
	path: string | undefined,
	read: (chunks: AsyncIterable<Uint8Array>) => Promise<Row[]>
): Promise<Row[]> {
	return path === undefined ? [] : (await readHashed(path, (chunks) => read(chunks))).value;
}

/** The line for a person, or null when the error is no fault of the input. */
function lineOf(error: unknown, options: AnalyseOptions | null): string | null {
	if (error instanceof Unusable) return error.message;
	if (error instanceof ParameterError) return `${optionOf(error.field)}: ${error.reason}`;
	if (!(error instanceof TableError)) return null;
	const place = [
		options?.[error.table] ?? error.table,
		error.row === null ? '' : `row ${error.row}`,
		error.column === null ? '' : `column ${error.column}`
	];
	return `${place.filter(Boolean).join(', ')}: ${error.reason}`;
}

/** Writes beside the place and moves it there, so that nobody ever sees half a file. */
async function writeWhole(path: string, text: string): Promise<void> {
	const target = fromWhereTyped(path);
	const part = `${target}.${process.pid}.part`;
	try {
		await writeFile(part, text);
		await rename(part, target);
	} catch (error) {
		await rm(part, { force: true });
		throw new Unusable(`${path}: cannot be written, ${reasonOf(error)}`);
	}
}

/**
 * `analyse --position P --spikes S --arena A …`
 * @returns 0 when done, 2 on input that cannot be used (one line on standard error, no output)
 */
export default async function main(args: string[]): Promise<number> {
	let options: AnalyseOptions | null = null;
	try {
		options = readOptions(args);
		const result = await analyse(options);
		const text = options.json === undefined ? readable(result) : JSON.stringify(result) + '\n';
		if (options.json === undefined || options.json === '-') process.stdout.write(text);
		else await writeWhole(options.json, text);
		return 0;
	} catch (error) {
		const line = lineOf(error, options);
		if (line === null) throw error;
		process.stderr.write(`${line.replace(/\s*\n\s*/g, ' ')}\n`);
		return UNUSABLE;
	}
}
