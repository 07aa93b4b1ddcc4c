import { beforeAll, describe, expect, it } from 'vitest';
import { Forbidden, Unauthenticated } from '$lib/server/errors';
import * as animals from '$lib/server/services/animals';
import { makeActor } from '../../factories/actor';
import { makeAnimal } from '../../factories/animal';
import { makeProtocol } from '../../factories/protocol';

let experimenter: Awaited<ReturnType<typeof makeActor>>;

beforeAll(async () => {
	experimenter = await makeActor('experimenter');
});

const codes = async () => (await animals.list(experimenter)).map((row) => row.code);

describe('pasting a list of animals', () => {
	it('is refused to nobody signed in and to observers, preview included', async () => {
		const observer = await makeActor('observer');
		await expect(animals.previewPaste(null, 'P1,rat')).rejects.toThrow(Unauthenticated);
		await expect(animals.previewPaste(observer, 'P1,rat')).rejects.toThrow(Forbidden);
		await expect(animals.paste(observer, 'P1,rat')).rejects.toThrow(Forbidden);
	});

	it('saves nothing while it is only looked at', async () => {
		const { rows } = await animals.previewPaste(experimenter, 'P10,rat\nP11,mouse');
		expect(rows.map((row) => row.issues)).toEqual([[], []]);
		expect(await codes()).not.toContain('P10');
	});

	it('saves none of the lines when one is wrong, and names that one', async () => {
		await expect(animals.paste(experimenter, 'P20,rat\nP21,cat')).rejects.toMatchObject({
			issues: [{ field: 'text', message: expect.stringContaining('Line 2') }]
		});
		expect(await codes()).not.toContain('P20');
	});

	it('saves all of a good list', async () => {
		const { number } = await makeProtocol();
		const text = `code\tspecies\tsex\tbaseline\tprotocol\nP30\trat\tm\t412,5\t${number}\nP31\trat\tf\t\t${number}`;
		expect(await animals.paste(experimenter, text)).toEqual({ codes: ['P30', 'P31'] });
		expect(await animals.get(experimenter, 'P30')).toMatchObject({
			baselineWeightG: 412.5,
			sex: 'male',
			protocol: number
		});
	});

	it('names the line whose code an animal has already', async () => {
		const { code } = await makeAnimal({ code: 'P40' });
		const { rows } = await animals.previewPaste(experimenter, `P41,rat\n${code.toLowerCase()},rat`);
		expect(rows[0].issues).toEqual([]);
		expect(rows[1].issues[0].column).toBe('code');
	});

	it('counts the places of a protocol down the list', async () => {
		const { number } = await makeProtocol({ animalsAllowed: 1 });
		const text = `code,species,protocol\nP50,rat,${number}\nP51,rat,${number}`;
		const { rows } = await animals.previewPaste(experimenter, text);
		expect(rows.map((row) => row.issues.map((issue) => issue.column))).toEqual([[], ['protocol']]);
		await expect(animals.paste(experimenter, text)).rejects.toThrow('allows 1 animals');
		expect(await codes()).not.toContain('P50');
	});
});
