import { describe, expect, it } from 'vitest';
import { sniff } from './sniff';

const bytes = (text: string) => new TextEncoder().encode(text);

describe('sniff', () => {
	it('is sure of headers that name field and unit', () => {
		const seen = sniff('position', bytes('T (s),X [cm],y_cm,note\n0,1,2,a\n1,2,3,b'), true);
		expect(seen).toMatchObject({
			format: 'table',
			dialect: { delimiter: ',', decimal: '.' },
			rows: [
				['0', '1', '2', 'a'],
				['1', '2', '3', 'b']
			],
			missing: [],
			needsConfirming: false,
			proposal: [
				{ column: 'T (s)', field: 't_s', isCertain: true },
				{ column: 'X [cm]', field: 'x_cm', isCertain: true },
				{ column: 'y_cm', field: 'y_cm', isCertain: true },
				{ column: 'note', field: null, isCertain: false }
			]
		});
	});

	it('asks a person about guesses, missing columns and decimal commas', () => {
		expect(sniff('spikes', bytes('cluster,time\n1,2\n'), true)).toMatchObject({
			needsConfirming: true,
			missing: [],
			proposal: [
				{ field: 'unit', isCertain: false },
				{ field: 't_s', isCertain: false }
			]
		});
		expect(sniff('spikes', bytes('unit,label\n1,2\n'), true)).toMatchObject({
			needsConfirming: true,
			missing: ['t_s']
		});
		expect(sniff('spikes', bytes('unit;t_s\n1;2,5\n'), true)).toMatchObject({
			needsConfirming: true,
			dialect: { delimiter: ';', decimal: ',' }
		});
	});

	it('does not read an unfinished last line', () => {
		const seen = sniff('spikes', bytes('unit,t_s\n1,2\n3,4.'), false);
		expect(seen).toMatchObject({ rows: [['1', '2']] });
	});

	it('refuses what is no table, whatever it is called, and knows arrays', () => {
		const pdf = bytes('%PDF-1.7 …');
		expect(sniff('spikes', pdf, false)).toEqual({
			format: 'refused',
			reason: 'This is a PDF document, not a table of text.'
		});
		expect(sniff('spikes', new Uint8Array(0), true)).toMatchObject({ format: 'refused' });
		expect(sniff('spikes', bytes('1,2\n3,4\n'), true)).toMatchObject({ format: 'refused' });
		const npy = Uint8Array.of(0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59, 1, 0);
		expect(sniff('spikes', npy, false)).toEqual({ format: 'npy' });
		expect(sniff('epochs', npy, false)).toMatchObject({ format: 'refused' });
	});
});
