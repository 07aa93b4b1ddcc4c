import { Readable } from 'node:stream';
import { seeded } from '$lib/analysis/random/seeded';
import * as landmarks from '$lib/server/services/landmarks';
import * as sessions from '$lib/server/services/sessions';
import * as takeIn from '$lib/server/services/take-in';
import * as tallies from '$lib/server/services/tallies';
import * as turns from '$lib/server/services/turns';
import * as weights from '$lib/server/services/weights';
import { PLACES, type DemoAnimal } from './animals';
import { planDay, type DayPlan } from './day-plan';
import { carriageOf } from './implant';
import { IMPLANT_MASS_G } from './implant-mass';
import type { LabDays } from './lab-days';
import type { Cast } from './people';
import { ARENAS, ORIGINS, RIG } from './registers';
import type { TrueCell } from './simulate/cell';
import { recordRun, type Recording } from './simulate/recording';
import { runOpen } from './simulate/run-open';
import { runStraight } from './simulate/run-straight';

/** Holds the clock at a moment of the past while something of then is entered. */
export type AtMoment = <T>(moment: Date, work: () => Promise<T>) => Promise<T>;

interface Scene {
	cast: Cast;
	days: LabDays;
	atMoment: AtMoment;
}

/** Enters one day of one animal through the services that pages use. */
export async function writeDay(scene: Scene, animal: DemoAnimal, daysAgo: number): Promise<void> {
	const { cast, days, atMoment } = scene;
	const by = cast.experimenter;
	const plan = planDay(animal, daysAgo);
	const at = <T>(time: string, work: () => Promise<T>) => atMoment(days.at(daysAgo, time), work);
	// On the day of surgery it is weighed in the morning, before.
	const implantMassG = daysAgo < animal.surgeryDaysAgo ? IMPLANT_MASS_G : 0;
	const grossG = plan.weight.netG + implantMassG;
	await at(plan.weight.time, () => weights.record(by, animal.code, { grossG, implantMassG }));
	for (const { time, bundle, turns: amount, reason } of plan.turns) {
		const carriage = carriageOf(bundle);
		await at(time, () => turns.record(by, animal.code, { carriage, turns: amount, reason }));
	}
	for (const session of plan.sessions) {
		await at(session.time, () => addSession(cast, animal, session, days.at(daysAgo, session.time)));
	}
	if (plan.landmarks.length > 0) {
		const rows = plan.landmarks.map((row) => ({ ...row, signConvention: 'positive drawn upward' }));
		await at('09:45', () => landmarks.record(by, animal.code, rows));
	}
	if (plan.tallies.length > 0) {
		await at('11:45', () => tallies.record(by, animal.code, days.date(daysAgo), plan.tallies));
	}
}

/** A session with its three files, sent as an upload would be. */
async function addSession(
	{ experimenter: by }: Cast,
	animal: DemoAnimal,
	{ place, durationS, cells, seed }: DayPlan['sessions'][number],
	startsAt: Date
): Promise<void> {
	const { id: sessionId } = await sessions.create(by, animal.code, {
		startsAt,
		arena: ARENAS[place],
		rig: RIG,
		note: 'Simulated.',
		epochs: [{ name: 'run', kind: 'run', startS: 0, stopS: durationS }]
	});
	const recording = simulate(place, durationS, cells, seed);
	const send = (kind: 'position' | 'spikes' | 'units', csv: string) =>
		takeIn.put(
			by,
			{ sessionId, kind, name: `${kind}.csv`, content: Readable.from([Buffer.from(csv)]) },
			kind === 'spikes' ? { sorting: { program: 'simulation' } } : {}
		);
	await send('position', recording.positionCsv);
	await send('spikes', recording.spikesCsv);
	await send('units', recording.unitsCsv);
}

function simulate(
	place: 'track' | 'box',
	durationS: number,
	cells: readonly TrueCell[],
	seed: number
): Recording {
	const { widthCm, heightCm } = PLACES[place];
	const random = seeded(seed, `run ${place}`);
	const path =
		heightCm === null
			? runStraight(widthCm, durationS, random)
			: runOpen(widthCm, heightCm, durationS, random);
	return recordRun(path, cells, seed, ORIGINS[place]);
}
