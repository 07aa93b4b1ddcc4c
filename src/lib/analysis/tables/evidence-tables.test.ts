import { describe, expect, it } from 'vitest';
import { tableRefusal } from '../../../../tests/factories/table-refusal';
import { readFeatures, readWaveforms } from './read-session-tables';

const bytes = (text: string) => [new TextEncoder().encode(text)];

describe('a table of mean waveforms', () => {
	it('is read whatever the order of its rows, channels in natural order', async () => {
		const text =
			'unit,channel,sample,uv\n7,10,1,4\n7,2,1,-2.5\n7,2,0,1\n7,10,0,3\nb,1,0,9\nb,1,1,8\n';
		const [first, second] = await readWaveforms(bytes(text));
		expect(first).toMatchObject({ unit: '7', bundle: null, channelLabels: ['2', '10'] });
		expect([...first.uv]).toEqual([1, -2.5, 3, 4]);
		expect(second).toMatchObject({ unit: 'b', channels: 1 });
	});

	it('may count samples from 1, and may name bundles and use decimal commas', async () => {
		const text =
			'bundle;unit;channel;sample;uv\nT1;1;1;1;0,5\nT1;1;1;2;-60,25\nT2;1;1;1;1,0\nT2;1;1;2;2,0\n';
		const units = await readWaveforms(bytes(text));
		expect(units.map(({ bundle }) => bundle)).toEqual(['T1', 'T2']);
		expect([...units[0].uv]).toEqual([0.5, -60.25]);
	});

	it.each([
		['7,1,0,1\n7,1,2,1\n', 'ragged', 'unit 7 has no sample 1 on channel 1'],
		['7,1,0,1\n7,1,1,1\n7,2,0,1\n', 'ragged', 'unit 7 has no sample 1 on channel 2'],
		['7,1,0,1\n7,1,0,1\n', 'duplicate', 'sample 0 of unit 7 stands twice on channel 1'],
		['7,1,0.5,1\n', 'not-a-number', 'sample 0.5 is no whole number'],
		['7,1,-1,1\n', 'not-a-number', 'sample -1 is no whole number']
	])('is refused: %j', async (rows, code, reason) => {
		const error = await tableRefusal(readWaveforms(bytes(`unit,channel,sample,uv\n${rows}`)));
		expect(error.code).toBe(code);
		expect(error.reason).toContain(reason);
		expect(error.table).toBe('waveforms');
	});
});

describe('a table of features', () => {
	const head = 't_s,bundle,unit,f1,f2\n';

	it('is parted by bundle; spikes without a unit belong to none', async () => {
		const rows = '0.1,T01,3,1,2\n0.2,T02,3,3,4\n0.3,T01,,5,6\n0.4,T01,8,7,8\n0.5,T01,3,9,10\n';
		const [first, second] = await readFeatures(bytes(head + rows));
		expect(first).toMatchObject({ bundle: 'T01', units: ['3', '8'], dimensions: 2 });
		expect([...first.unitOf]).toEqual([0, -1, 1, 0]);
		expect([...first.values]).toEqual([1, 2, 5, 6, 7, 8, 9, 10]);
		expect(second).toMatchObject({ bundle: 'T02', units: ['3'] });
		expect([...second.values]).toEqual([3, 4]);
	});

	it.each([
		['t_s,bundle,unit,f1,f3\n0.1,T01,3,1,2\n', 'header', 'there is f3 and no f2'],
		['t_s,bundle,unit\n0.1,T01,3\n', 'header', 'no column f1'],
		[`${head}0.1,,3,1,2\n`, 'missing-value', 'the cell is empty'],
		[`${head}0.1,T01,3,1,x\n`, 'not-a-number', '"x" is not a number']
	])('is refused: %j', async (text, code, reason) => {
		const error = await tableRefusal(readFeatures(bytes(text)));
		expect(error.code).toBe(code);
		expect(error.reason).toContain(reason);
	});
});
