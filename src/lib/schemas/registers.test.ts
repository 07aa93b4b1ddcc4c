import { describe, expect, it } from 'vitest';
import { registerKinds, registers } from './registers';

const valid: Record<string, Record<string, unknown>> = {
	projects: { name: 'Remapping' },
	protocols: {
		number: '24-117',
		title: 'Place cells',
		animalsAllowed: 20,
		surgeriesAllowed: 1,
		weightFloorPercent: 85,
		expiresOn: '2027-01-31'
	},
	arenas: { name: 'Long track', description: 'straight:300' },
	rigs: { name: 'Rig 2' },
	'drive-designs': { name: 'Sixteen', travelMm: 6 },
	drives: { designId: '01890a5d-ac96-774b-bcce-b302099a8057', serial: 'D-14' }
};

describe.each(registerKinds)('register of %s', (kind) => {
	const register = registers[kind];
	const shape = Object.keys(register.schema.shape);
	const filled = { ...register.blank, ...valid[kind] };

	it('draws every value of its schema in the form, the revision aside', () => {
		const drawn = register.fields.map((field) => field.name);
		expect([...drawn, 'revision'].toSorted()).toEqual(shape.toSorted());
		expect(Object.keys(register.blank).toSorted()).toEqual(shape.toSorted());
	});

	it('accepts a plain good row', () => {
		expect(register.schema.safeParse(filled).error?.issues).toBeUndefined();
	});

	it('refuses a blank form', () => {
		expect(register.schema.safeParse(register.blank).success).toBe(false);
	});
});

describe('drive design', () => {
	const { schema, blank } = registers['drive-designs'];
	const fill = (values: object) =>
		schema.safeParse({ ...blank, name: 'D', travelMm: 5, ...values });

	it('needs a thread of the list or a pitch', () => {
		expect(fill({ thread: '', pitchUm: null }).success).toBe(false);
		expect(fill({ thread: '', pitchUm: 320 }).success).toBe(true);
	});

	it('refuses a pitch that contradicts the thread, and keeps a measured one', () => {
		expect(fill({ thread: '0-80 UNF', pitchUm: 250 }).success).toBe(false);
		expect(fill({ thread: '0-80 UNF', pitchUm: 318.2 }).success).toBe(true);
	});
});

describe('arena', () => {
	const { schema, blank } = registers.arenas;
	const fill = (values: object) =>
		schema.safeParse({ ...blank, name: 'A', description: 'straight:300', ...values });

	it('takes both ends of a straight track or none', () => {
		expect(fill({ endAX: 0, endAY: 0, endBX: 290, endBY: 4 }).success).toBe(true);
		expect(fill({ endAX: 0 }).success).toBe(false);
		expect(fill({ endAX: 1, endAY: 1, endBX: 1, endBY: 1 }).success).toBe(false);
	});

	it('refuses ends on anything but a straight track', () => {
		const ends = { endAX: 0, endAY: 0, endBX: 290, endBY: 4 };
		expect(fill({ ...ends, description: 'disc:75' }).success).toBe(false);
	});

	it('refuses a shape the parser cannot read', () => {
		expect(fill({ description: 'straight:long' }).error?.issues[0].path).toEqual(['description']);
	});
});

describe('protocol', () => {
	it('refuses half an animal rather than cutting it off', () => {
		const { schema, blank } = registers.protocols;
		const row = { ...blank, ...valid.protocols, animalsAllowed: 2.5 };
		expect(schema.safeParse(row).error?.issues[0].message).toBe('Whole numbers only.');
	});
});
