const ANYTHING = '01890000-0000-7000-8000-000000000001';

/**
 * Fields that make each form of the lab readable, so that what refuses them is the permission and
 * not a missing field. Forms leave alone what they do not know.
 */
export const PLAUSIBLE: Record<string, string> = {
	id: ANYTHING,
	file: ANYTHING,
	analysis: ANYTHING,
	personId: ANYTHING,
	surgeon: ANYTHING,
	designId: ANYTHING,
	kind: 'protocol',
	why: 'Sent by a script',
	revision: '0',
	name: 'Sent by a script',
	number: 'S-1',
	title: 'Sent by a script',
	animalsAllowed: '4',
	surgeriesAllowed: '1',
	restriction: 'none',
	weightFloorPercent: '85',
	expiresOn: '2030-12-31',
	description: 'straight:100',
	binCm: '5',
	thread: '0-80 UNF',
	travelMm: '5',
	smallestStepTurns: '0.125',
	serial: 'S-1',
	code: 'S1',
	species: 'rat',
	sex: 'male',
	status: 'in-lab',
	animal: 'R034',
	grossG: '300',
	surgeryDate: '2026-01-05',
	driveDesign: 'Sent by a script',
	bundles: 'T01',
	site: 'right CA1',
	startsAt: '2026-01-05T10:00',
	text: 'code,species,sex',
	email: 'somebody@example.org',
	roles: 'observer',
	role: 'observer',
	isBlinded: 'true',
	dayStartsAt: '04:00',
	version: '0'
};
