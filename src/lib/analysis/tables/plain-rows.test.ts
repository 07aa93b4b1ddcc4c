import { describe, expect, it } from 'vitest';
import { joinSpikeTables } from './join-spike-tables';
import { readPosition, readSpikes } from './read-session-tables';
import { TableError } from './table-error';

const spikesIn = (text: string) => readSpikes([new TextEncoder().encode(text)]);

describe('rows read by the compiled kernel and rows it leaves', () => {
	it('come in the order of the file, whatever is odd about them', async () => {
		const rows = [
			...['7,1.5', ' 7 , 2.5', '"7",3.5', '7,4.5e0', '7,+5.5\r', '', '7,6.5  ', '7,-0.5'],
			...['a label of more than sixteen bytes,1', 'ä,2', '7,1234567890123456.75', '007,3']
		];
		const { units } = await spikesIn(`unit,t_s\n${rows.join('\n')}\n`);
		expect(units.map(({ unit, timesS }) => [unit, ...timesS])).toEqual([
			['7', -0.5, 1.5, 2.5, 3.5, 4.5, 5.5, 6.5, 1234567890123456.75],
			['007', 3],
			['ä', 2],
			['a label of more than sixteen bytes', 1]
		]);
	});

	it('give the nearest float64 of every number', async () => {
		const texts = Array.from({ length: 3000 }, (_, k) => ((k * 7919.123457) % 9000).toFixed(k % 7));
		const rows = texts.map((text, k) => `${k},${text}`);
		const bytes = new TextEncoder().encode(`t_s,x_mm\n${rows.join('\n')}`);
		const { xCm } = await readPosition([bytes]);
		expect([...xCm]).toEqual(texts.map((text) => Number(text) / 10));
	});

	it('name the line of a fault far down', async () => {
		const rows = Array.from({ length: 40_000 }, (_, k) => `${k % 9},${k}.25`);
		rows[38_765] = '3,x';
		await expect(spikesIn(`unit,t_s\n${rows.join('\n')}`)).rejects.toThrow(TableError);
		await expect(spikesIn(`unit,t_s\n${rows.join('\n')}`)).rejects.toThrow('row 38767');
	});

	it('read long labels in every row, too', async () => {
		const rows = Array.from({ length: 50_000 }, (_, k) => `bundle seventeen ${k % 2},${k}`);
		const { units, spikes } = await spikesIn(`unit,t_s\n${rows.join('\n')}\n`);
		expect(spikes).toBe(50_000);
		expect(units.map(({ timesS }) => timesS.length)).toEqual([25_000, 25_000]);
	});
});

describe('joinSpikeTables', () => {
	it('equals the table read whole', async () => {
		const rows = ['b,1', 'a,2', 'b,3', 'a,1', 'c,9', 'b,2'];
		const header = 'unit,t_s\n';
		const parts = await Promise.all(
			[rows.slice(0, 3), rows.slice(3)].map((part) => spikesIn(header + part.join('\n')))
		);
		expect(joinSpikeTables(parts)).toEqual(await spikesIn(header + rows.join('\n')));
	});
});
