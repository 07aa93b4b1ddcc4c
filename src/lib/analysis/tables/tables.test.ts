import { describe, expect, it } from 'vitest';
import { tableRefusal } from '../../../../tests/factories/table-refusal';
import { seeded } from '../random/seeded';
import { readEpochs, readPosition, readSpikes, readUnits } from './read-session-tables';

const bytes = (text: string) => new TextEncoder().encode(text);
/** The text in pieces of a few bytes, so that every boundary is met. */
function pieces(text: string, size = text.length): Uint8Array[] {
	const all = bytes(text);
	return Array.from({ length: Math.ceil(all.length / size) }, (_, k) =>
		all.slice(k * size, (k + 1) * size)
	);
}

describe('a table of positions', () => {
	it.each([
		['commas', 't_s,x_cm,y_cm\n0.0,1.5,-2\n0.1,.5,2e1\n'],
		['tabs and CR LF', 't_s\tx_cm\ty_cm\r\n0.0\t1.5\t-2\r\n0.1\t.5\t2e1\r\n'],
		['semicolons and decimal commas', 't_s;x_cm;y_cm\n0,0;1,5;-2\n0,1;,5;2e1\n'],
		['quotes, spaces and no last line feed', '"t_s", "x_cm" ,y_cm\n "0.0", 1.5 ,-2\n0.1,0.5, 20'],
		[
			'a byte order mark, blank lines and another order',
			'\uFEFFy_cm,t_s,note,x_cm\n\n-2,0.0,,1.5\n  \n20,0.1,"a, b",0.5\n\n'
		]
	])('is read with %s', async (_, text) => {
		for (const size of [1, 3, text.length]) {
			const { tS, xCm, yCm, headDeg } = await readPosition(pieces(text, size));
			expect([...tS]).toEqual([0, 0.1]);
			expect([...xCm]).toEqual([1.5, 0.5]);
			expect(yCm && [...yCm]).toEqual([-2, 20]);
			expect(headDeg).toBeNull();
		}
	});

	it('gives the nearest float64 for every number, as the language itself does', async () => {
		const random = seeded(21);
		const written = Array.from({ length: 4000 }, (_, i) => {
			const value = (random.next() - 0.5) * 10 ** random.below(4);
			return [String(value), value.toFixed(random.below(20)), value.toExponential(5)][i % 3];
		});
		const text = 't_s,x_cm\n' + written.map((x, i) => `${i},${x}`).join('\n');
		const { xCm } = await readPosition(pieces(text, 777));
		expect(xCm).toEqual(Float64Array.from(written, Number));
	});

	it('takes millimetres, metres, milliseconds and pixels when the header says so', async () => {
		const mm = await readPosition(pieces('t_ms,x_mm,y_mm\n1500,123,45\n'));
		expect([mm.tS[0], mm.xCm[0], mm.yCm?.[0]]).toEqual([1.5, 12.3, 4.5]);
		const px = await readPosition(pieces('t_s,x_px,y_px\n0,180,720\n'), { pxPerCm: 4 });
		expect([px.xCm[0], px.yCm?.[0]]).toEqual([45, 180]);
		const error = await tableRefusal(readPosition(pieces('t_s,x_px,y_px\n0,180,720\n')));
		expect(error).toMatchObject({ code: 'header', column: 'x_px' });
		expect(error.reason).toContain('pixels per cm');
	});

	it('reads columns under other names when they are mapped, never by guess', async () => {
		const text = 'time,px,skip\n0,1,x\n1,2,y\n';
		const mapping = { time: 't_s', px: 'x_cm', skip: '' };
		expect([...(await readPosition(pieces(text), { mapping })).xCm]).toEqual([1, 2]);
		expect(await tableRefusal(readPosition(pieces('time,x\n0,1\n')))).toMatchObject({
			code: 'header',
			row: 1,
			column: 't_s'
		});
		const twice = readPosition(pieces(text), { mapping: { time: 't_s', px: 't_ms' } });
		expect(await tableRefusal(twice)).toMatchObject({ code: 'mapping', column: 'px' });
		const absent = readPosition(pieces(text), { mapping: { t: 't_s' } });
		expect(await tableRefusal(absent)).toMatchObject({ code: 'mapping', column: 't' });
	});

	it.each([
		['', 'empty', null, null],
		['t_s,x_cm\n', 'empty', null, null],
		['\n\n1,2\n', 'empty', 1, null],
		['0.0,1.5\n0.1,2.5\n', 'header', 1, null],
		['t_s,x_cm,x_cm\n0,1,1\n', 'header', 1, 'x_cm'],
		['t_s,x_cm\n0,1\n0.1,abc\n', 'not-a-number', 3, 'x_cm'],
		['t_s,x_cm\n0,1\n\n0.1,1.2.3\n', 'not-a-number', 4, 'x_cm'],
		['t_s,x_cm\n0,1\n0.1,NaN\n', 'missing-value', 3, 'x_cm'],
		['t_s,x_cm\n0,1\n0.1,\n', 'missing-value', 3, 'x_cm'],
		['t_s,x_cm\n0,1\n0.1,inf\n', 'missing-value', 3, 'x_cm'],
		['t_s,x_cm\n0,1\n0.1\n', 'ragged', 3, null],
		['t_s,x_cm\n0,1\n0,1,5,2\n', 'ragged', 3, null],
		['t_s;x_cm\n0,1;1.234,5\n', 'not-a-number', 2, 'x_cm'],
		['t_s,x_cm\n0,1\n0.1,30000000\n', 'absurd-position', 3, 'x_cm']
	])('%j is refused: %s', async (text, code, row, column) => {
		expect(await tableRefusal(readPosition(pieces(text, 5)))).toMatchObject({
			table: 'position',
			code,
			row,
			column
		});
	});

	it('says how decimal commas can be told apart', async () => {
		const error = await tableRefusal(readPosition(pieces('t_s,x_cm\n0,0,1,5\n')));
		expect(error.reason).toContain('semicolons');
	});

	it.each([
		['a picture', [0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10], 'PNG image'],
		['an archive', [0x50, 0x4b, 3, 4, 0, 0, 0, 0], 'zip archive'],
		['an HDF5 file', [0x89, 0x48, 0x44, 0x46, 13, 10, 26, 10], 'HDF5'],
		['UTF-16', [0xff, 0xfe, 0x74, 0, 0x5f, 0, 0x73, 0], 'UTF-8'],
		['other bytes', [0x74, 0, 1, 2, 3, 4, 5, 6], 'binary']
	])('%s under the name of a table is refused', async (_, head, part) => {
		const error = await tableRefusal(readPosition([Uint8Array.from(head)]));
		expect(error).toMatchObject({ code: 'not-a-table' });
		expect(error.reason).toContain(part);
	});

	it('is refused when a line never ends, before it fills the memory', async () => {
		function* endless() {
			yield bytes('t_s,x_cm\n' + '1,2\n'.repeat(20_000));
			for (;;) yield new Uint8Array(65_536).fill(49);
		}
		expect(await tableRefusal(readPosition(endless()))).toMatchObject({ code: 'not-a-table' });
	});
});

describe('a table of spikes', () => {
	it('is grouped by unit in natural order, each unit sorted, labels kept as written', async () => {
		const text = 'unit,t_s,bundle\n10,3,T02\n2,1,T01\n10,1.5,T02\nb-7,9,\n2,0.5,T01\n';
		const { units, spikes, warnings } = await readSpikes(pieces(text, 4));
		expect(units.map(({ unit, bundle, timesS }) => [unit, bundle, [...timesS]])).toEqual([
			['2', 'T01', [0.5, 1]],
			['10', 'T02', [1.5, 3]],
			['b-7', null, [9]]
		]);
		expect(spikes).toBe(5);
		expect(warnings).toEqual([]);
	});

	it('takes one label in two bundles for two units and says so', async () => {
		const { units, warnings } = await readSpikes(pieces('unit,t_s,bundle\n1,1,A\n1,2,B\n'));
		expect(units.map(({ bundle }) => bundle)).toEqual(['A', 'B']);
		expect(warnings[0]).toContain('different units: 1');
	});

	it('is refused with an empty label or with times where labels belong', async () => {
		expect(await tableRefusal(readSpikes(pieces('unit,t_s\n,1\n')))).toMatchObject({
			code: 'missing-value',
			row: 2,
			column: 'unit'
		});
		const times = Array.from({ length: 20_001 }, (_, i) => `${i / 7},1\n`).join('');
		expect(await tableRefusal(readSpikes(pieces(`unit,t_s\n${times}`)))).toMatchObject({
			code: 'too-large',
			column: 'unit'
		});
	});

	it('keeps apart many labels, long and short', async () => {
		const labels = Array.from({ length: 3000 }, (_, i) => `unit-${i % 2 ? 'é'.repeat(9) : ''}${i}`);
		const text = 'unit,t_s\n' + labels.map((label, i) => `${label},${i}`).join('\n');
		const { units } = await readSpikes(pieces(text, 1000));
		expect(new Set(units.map(({ unit }) => unit))).toEqual(new Set(labels));
	});
});

describe('tables of units and epochs', () => {
	it('read classes, microvolts and empty cells', async () => {
		const text = 'unit,bundle,class,amplitude_uv,noise_uv\n1,T01,Principal,120.5,\n2,,,,9\n';
		expect(await readUnits(pieces(text, 6))).toEqual([
			{ unit: '1', bundle: 'T01', class: 'principal', amplitudeUv: 120.5, noiseUv: null },
			{ unit: '2', bundle: null, class: null, amplitudeUv: null, noiseUv: 9 }
		]);
		const wrong = tableRefusal(readUnits(pieces('unit,class\n1,pyramid\n')));
		expect(await wrong).toMatchObject({ code: 'not-a-kind', row: 2, column: 'class' });
		const twice = tableRefusal(readUnits(pieces('unit\n1\n1\n')));
		expect(await twice).toMatchObject({ code: 'duplicate', row: 3 });
	});

	it('read epochs and refuse unknown kinds and backward times', async () => {
		const text = 'name,kind,start_s,stop_s\nrun1,run,0,10\n"nap, box",REST,10,20.5\n';
		expect(await readEpochs(pieces(text, 7))).toEqual([
			{ name: 'run1', kind: 'run', startS: 0, stopS: 10 },
			{ name: 'nap, box', kind: 'rest', startS: 10, stopS: 20.5 }
		]);
		const kind = tableRefusal(readEpochs(pieces('name,kind,start_s,stop_s\na,walk,0,1\n')));
		expect(await kind).toMatchObject({ code: 'not-a-kind', row: 2, column: 'kind' });
		const time = tableRefusal(readEpochs(pieces('name,kind,start_s,stop_s\na,run,5,5\n')));
		expect(await time).toMatchObject({ code: 'time-order', row: 2, column: 'stop_s' });
	});
});
