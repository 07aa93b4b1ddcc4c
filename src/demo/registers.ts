import { personOf } from '$lib/server/access';
import * as registers from '$lib/server/services/registers';
import type { DemoAnimal } from './animals';
import { IMPLANT_MASS_G } from './implant-mass';
import type { Cast } from './people';

export const PROJECT = 'Simulated place cells';
export const PROTOCOL = 'SIM-0001';
export const RIG = 'Rig 1 (simulated)';
export const DESIGN = 'Sixteen-screw drive (simulated)';
export const ARENAS = { track: 'Long track (simulated)', box: 'Open field (simulated)' } as const;

/** Where each arena's origin lies in the camera's plane, cm. */
export const ORIGINS = { track: { xCm: 20, yCm: 60 }, box: { xCm: 0, yCm: 0 } } as const;

const TRACK_CM = 300;

/** What a PI prepares before the first animal. */
export async function addRegisters(
	{ pi, surgeon, experimenter }: Cast,
	expiresOn: string,
	animals: readonly DemoAnimal[]
): Promise<void> {
	const note = 'Invented for the demo lab.';
	await registers.create(pi, 'projects', {
		name: PROJECT,
		summary: 'Invented for the demo lab: all data are simulated, with the truth known.'
	});
	await registers.create(pi, 'protocols', {
		number: PROTOCOL,
		title: 'Invented protocol of the demo lab; no approval stands behind it',
		animalsAllowed: 12,
		surgeriesAllowed: 1,
		restriction: 'food',
		weightFloorPercent: 85,
		longestImplantDays: 180,
		endPoints:
			'Invented text. In a lab, the approved protocol, the veterinarian and local rules decide about animals.',
		expiresOn,
		people: [pi, surgeon, experimenter].map(personOf)
	});
	await registers.create(pi, 'arenas', {
		name: ARENAS.track,
		description: `straight:${TRACK_CM}`,
		binCm: 5,
		pxPerCm: null,
		endAX: ORIGINS.track.xCm,
		endAY: ORIGINS.track.yCm,
		endBX: ORIGINS.track.xCm + TRACK_CM,
		endBY: ORIGINS.track.yCm,
		note
	});
	await registers.create(pi, 'arenas', {
		name: ARENAS.box,
		description: 'rectangle:100x80',
		binCm: 5,
		pxPerCm: null,
		endAX: null,
		endAY: null,
		endBX: null,
		endBY: null,
		note
	});
	await registers.create(pi, 'rigs', {
		name: RIG,
		place: 'Room 0',
		reference: 'T16',
		ground: 'skull screw',
		filters: '600 to 6000 Hz',
		gain: '',
		headstageSerial: 'SIM-H-01',
		note
	});
	const design = await registers.create(pi, 'drive-designs', {
		name: DESIGN,
		thread: '0-80 UNF',
		pitchUm: 317.5,
		travelMm: 5,
		smallestStepTurns: 0.0625,
		backlashUm: 30,
		isClockwiseLowering: true,
		note
	});
	for (const { driveSerial } of animals) {
		await registers.create(pi, 'drives', {
			designId: design.id,
			serial: driveSerial,
			measuredPitchUm: null,
			massG: IMPLANT_MASS_G,
			note
		});
	}
}
