import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { closeThreads } from '$lib/server/jobs/threads';
import { forgetSettings, settings } from '$lib/server/settings';
import { TooLarge } from '$lib/server/errors';
import { Analysis } from '$lib/server/models/analysis';
import { DataFile } from '$lib/server/models/data-file';
import { Sorting } from '$lib/server/models/sorting';
import { SortingSession } from '$lib/server/models/sorting-session';
import * as dataFiles from '$lib/server/services/data-files';
import { makeBench, send, spikes, walk, type Bench } from './lab';

let bench: Bench;

beforeEach(async () => {
	bench = await makeBench();
});

/** Nothing of a refused file is in the record, and its original is. */
async function expectNothingLoaded({ by, sessionId }: Bench, file: dataFiles.DataFileView) {
	expect(file).toMatchObject({ state: 'refused', rows: null });
	const row = await DataFile.findByPk(file.id, { rejectOnEmpty: true });
	expect(row.parsedSha256).toBeNull();
	expect(await SortingSession.count({ where: { sessionId } })).toBe(0);
	expect(await Analysis.count({ where: { sessionId } })).toBe(0);
	const { content, bytes } = await dataFiles.original(by, file.id);
	expect(Buffer.concat(await content.toArray())).toHaveLength(bytes);
}

const lines = (text: string) => text.trimEnd().split('\n');
const changed = (text: string, row: number, line: string) =>
	lines(text)
		.with(row - 1, line)
		.join('\n');

describe('a table of positions', () => {
	it.each<[string, string, { code: string; row?: number | null; column?: string | null }, RegExp]>([
		[
			'with another header',
			walk().replace('t_s,x_cm', 'when,where'),
			{ code: 'header', row: 1, column: 't_s' },
			/No column t_s; the header reads: when, where/
		],
		[
			'with a word in a number column',
			changed(walk(), 7, '0.250,fast'),
			{ code: 'not-a-number', row: 7, column: 'x_cm' },
			/"fast" is not a number/
		],
		[
			'that goes back in time',
			changed(walk(), 9, '0.100,3.00'),
			{ code: 'time-order', row: 9, column: 't_s' },
			/lies before/
		],
		[
			'that repeats a time at another place',
			changed(walk(), 9, '0.300,77.00'),
			{ code: 'time-order', row: 9, column: 't_s' },
			/same as/
		],
		[
			'with a place beyond anything tracked',
			changed(walk(), 5, '0.150,-99999999'),
			{ code: 'absurd-position', row: 5, column: 'x_cm' },
			/100 m/
		],
		[
			'with NaN',
			changed(walk(), 12, '0.500,NaN'),
			{ code: 'missing-value', row: 12, column: 'x_cm' },
			/no value/
		],
		['that is empty', '', { code: 'empty' }, /The file is empty/],
		['with a header and nothing below', 't_s,x_cm\n', { code: 'empty' }, /no row below/],
		[
			'in milliseconds where seconds are expected',
			walk()
				.split('\n')
				.map((line, i) =>
					i > 0 && line ? line.replace(/^[\d.]+/, (t) => String(Number(t) * 1000)) : line
				)
				.join('\n'),
			{ code: 'unit-of-time' },
			/milliseconds/
		],
		[
			'with a row that is cut short',
			`${walk()}120.05`,
			{ code: 'ragged', row: 2402 },
			/1 cells, but the header has 2/
		]
	])('%s is refused with row, column and reason', async (_name, text, refusal, message) => {
		const file = await send(bench, 'position', text);
		expect(file.refusal).toMatchObject(refusal);
		expect(file.refusal?.message).toMatch(message);
		await expectNothingLoaded(bench, file);
	});

	it.each([
		['a zip archive', [0x50, 0x4b, 0x03, 0x04, 1, 2, 3, 4], /zip archive/],
		['a PNG image', [0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10], /PNG image/]
	])('that is %s renamed to .csv is refused', async (_name, bytes, message) => {
		const file = await send(bench, 'position', Uint8Array.from(bytes));
		expect(file.refusal?.message).toMatch(message);
		await expectNothingLoaded(bench, file);
	});

	it('may be mended by saying how it is to be read', async () => {
		const text = walk().replace('t_s,x_cm', 'when,where');
		const refused = await send(bench, 'position', text);
		expect(refused.state).toBe('refused');
		const taken = await send(bench, 'position', text, 'position.csv', {
			mapping: { when: 't_s', where: 'x_cm' }
		});
		expect(taken).toMatchObject({ id: refused.id, state: 'taken-in', rows: 2400, refusal: null });
	});

	it('with decimal commas and semicolons reads the same', async () => {
		const text = walk().replaceAll(',', ';').replaceAll('.', ',');
		const file = await send(bench, 'position', text);
		expect(file).toMatchObject({ state: 'taken-in', rows: 2400 });
		expect(file.reading.recognised).toMatchObject({ decimal: ',', needsConfirming: true });
		expect(file.warnings).toContain('Numbers were read with decimal commas.');
		const points = await send(await makeBench(), 'position', walk());
		const digests = await DataFile.findAll({
			where: { id: [file.id, points.id] },
			attributes: ['parsedSha256']
		});
		expect(digests[0].parsedSha256).toBe(digests[1].parsedSha256);
	});
});

/** A NumPy array of float64, little-endian. */
function npy(shape: number[], values: number[]): Uint8Array {
	const text = `{'descr': '<f8', 'fortran_order': False, 'shape': (${shape.join(', ')},), }`;
	const header = text.padEnd(117) + '\n';
	const head = Buffer.from([0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59, 1, 0, 118, 0]);
	return Buffer.concat([head, Buffer.from(header), Buffer.from(new Float64Array(values).buffer)]);
}

describe('a NumPy array', () => {
	const path = lines(walk())
		.slice(1)
		.flatMap((line) => line.split(',').map(Number));

	it('of t_s and x_cm is taken in', async () => {
		const bytes = npy([2400, 2], path);
		const file = await send(bench, 'position', bytes, 'position.npy');
		expect(file).toMatchObject({ state: 'taken-in', format: 'npy', rows: 2400 });
	});

	it('that is cut short is refused', async () => {
		const bytes = npy([2400, 2], path).subarray(0, 20_000);
		const file = await send(bench, 'position', bytes, 'position.npy');
		expect(file.refusal).toMatchObject({ code: 'truncated' });
		expect(file.refusal?.message).toMatch(/cut short: 2484 of 4800 numbers/);
		await expectNothingLoaded(bench, file);
	});

	it('of times and another of labels make one sorting', async () => {
		const rows = lines(spikes()).slice(1);
		const times = npy(
			[rows.length],
			rows.map((row) => Number(row.split(',')[1]))
		);
		const labels = npy(
			[rows.length],
			rows.map((row) => Number(row.split(',')[0]))
		);
		const { id } = await dataFiles.receive(bench.by, {
			sessionId: bench.sessionId,
			kind: 'spikes',
			name: 'labels.npy',
			content: Readable.from([labels])
		});
		const file = await send(bench, 'spikes', times, 'times.npy', { labelsFileId: id });
		expect(file).toMatchObject({ state: 'taken-in', rows: rows.length });
		expect(file.reading.found?.units).toBe(2);
	});
});

describe('a table of spikes', () => {
	it('without a spike is refused', async () => {
		const file = await send(bench, 'spikes', 'unit,t_s\n');
		expect(file.refusal?.message).toMatch(/no row below/);
		await expectNothingLoaded(bench, file);
	});

	it('of another moment than the positions is refused', async () => {
		await send(bench, 'position', walk());
		const file = await send(bench, 'spikes', spikes(120, 90_000_000));
		expect(file.refusal).toMatchObject({ code: 'no-overlap' });
		await expectNothingLoaded(bench, file);
	});

	it('in milliseconds is refused with the hint', async () => {
		await send(bench, 'position', walk());
		const file = await send(
			bench,
			'spikes',
			spikes().replace(/,(\d+\.\d+),/g, (_, t) => `,${Number(t) * 1000},`)
		);
		expect(file.refusal).toMatchObject({ code: 'unit-of-time' });
		expect(file.refusal?.message).toMatch(/milliseconds/);
	});

	it('leaves positions of another moment refused when it came first', async () => {
		await send(bench, 'spikes', spikes(120, 5000));
		const file = await send(bench, 'position', walk());
		expect(file.refusal).toMatchObject({ code: 'no-overlap' });
		expect(await Analysis.count({ where: { sessionId: bench.sessionId } })).toBe(0);
	});
});

describe('the size limit', () => {
	beforeEach(() => {
		process.env.UPLOAD_LIMIT_MB = '0.01';
		forgetSettings();
	});

	afterEach(async () => {
		delete process.env.UPLOAD_LIMIT_MB;
		forgetSettings();
		// Threads read their settings when they start.
		await closeThreads();
	});

	it('refuses a larger file, keeps nothing of it and says what to do', async () => {
		await expect(send(bench, 'position', walk())).rejects.toThrow(TooLarge);
		await expect(send(bench, 'position', walk())).rejects.toThrow(
			/larger than this lab takes .*Nothing was kept/
		);
		expect(await dataFiles.list(bench.by, bench.sessionId)).toEqual([]);
		expect(await readdir(join(settings().storageUrl, '.incoming'))).toEqual([]);
	});
});

describe('an upload that is cut off', () => {
	it.each([
		['while it is read', (cut: Readable) => setTimeout(() => cut.destroy(), 500)],
		['before anybody reads it', (cut: Readable) => cut.destroy()]
	])('%s leaves no file, no row and nothing aside', async (_, end) => {
		const cut = new Readable({ read() {} });
		cut.push(walk().slice(0, 5000));
		end(cut);
		await expect(
			dataFiles.receive(bench.by, {
				sessionId: bench.sessionId,
				kind: 'position',
				name: 'position.csv',
				content: cut
			})
		).rejects.toThrow(/cut off|Premature close|aborted/);
		expect(await dataFiles.list(bench.by, bench.sessionId)).toEqual([]);
		expect(await readdir(join(settings().storageUrl, '.incoming'))).toEqual([]);
	});
});

describe('the same file sent again', () => {
	it('is the file that is there, and adds no sorting', async () => {
		const first = await send(bench, 'spikes', spikes());
		const second = await send(bench, 'spikes', spikes());
		expect(second.id).toBe(first.id);
		expect(await Sorting.count({ where: { dataFileId: first.id } })).toBe(1);
	});

	it('asks for one analysis only', async () => {
		await send(bench, 'position', walk());
		await send(bench, 'spikes', spikes());
		await send(bench, 'position', walk());
		expect(await Analysis.count({ where: { sessionId: bench.sessionId } })).toBe(1);
	});
});
