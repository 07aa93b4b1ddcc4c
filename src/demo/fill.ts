import { now, setClock } from '$lib/server/clock';
import { closeThreads } from '$lib/server/jobs/threads';
import { Person } from '$lib/server/models/person';
import { record } from '$lib/server/record';
import { systemActor } from '$lib/server/access';
import { db } from '$lib/server/db';
import * as animals from '$lib/server/services/animals';
import * as labSettings from '$lib/server/services/lab-settings';
import { DEMO_ANIMALS, type DemoAnimal } from './animals';
import { addImplant } from './implant';
import { labDays, type LabDays } from './lab-days';
import { addPeople, type Cast } from './people';
import { addRegisters, PROJECT, PROTOCOL } from './registers';
import { writeDay, type AtMoment } from './write-day';

/** Days in the lab before surgery, for weights at rest. */
const DAYS_BEFORE = 3;

const LAB_NAME = 'Demo lab (simulated data)';

/**
 * Fills an empty database with the demo lab: invented people and animals, simulated data with known
 * truth, entered through the services that pages use, each thing at its own moment of the past.
 * A database that has people is left alone. Analyses are asked for; the worker does them.
 */
export default function fill(report: (line: string) => void = () => undefined): Promise<void> {
	return fillWith(DEMO_ANIMALS, report);
}

/** The same with other animals, for tests. */
export async function fillWith(
	demoAnimals: readonly DemoAnimal[],
	report: (line: string) => void
): Promise<void> {
	db();
	if ((await Person.count()) > 0) return;
	try {
		const days = await labDays();
		const cast = await atMoment(days.at(firstDayOf(demoAnimals), '07:00'), async () => {
			await nameLab();
			const people = await addPeople();
			await addRegisters(people, inTwoYears(now()), demoAnimals);
			return people;
		});
		report('People, project, protocol, arenas, rig and drives are there.');
		await tellDays(demoAnimals, cast, days, report);
	} finally {
		await closeThreads();
	}
}

/** Day by day over all animals, so that the log tells the lab's days in their order. */
async function tellDays(
	demoAnimals: readonly DemoAnimal[],
	cast: Cast,
	days: LabDays,
	report: (line: string) => void
): Promise<void> {
	for (let daysAgo = firstDayOf(demoAnimals); daysAgo >= 0; daysAgo--) {
		for (const animal of demoAnimals) {
			const arrivesDaysAgo = animal.surgeryDaysAgo + DAYS_BEFORE;
			if (daysAgo > arrivesDaysAgo) continue;
			if (daysAgo === arrivesDaysAgo) {
				await atMoment(days.at(daysAgo, '08:00'), () => addAnimal(cast, days, animal));
			}
			await writeDay({ cast, days, atMoment }, animal, daysAgo);
			if (daysAgo === animal.surgeryDaysAgo) {
				await atMoment(days.at(daysAgo, '14:00'), () =>
					addImplant(cast.surgeon, animal, days.date(daysAgo))
				);
			}
		}
		report(`${days.date(daysAgo)} is written.`);
	}
}

/** How many days ago the first animal came. */
const firstDayOf = (demoAnimals: readonly DemoAnimal[]) =>
	Math.max(...demoAnimals.map(({ surgeryDaysAgo }) => surgeryDaysAgo)) + DAYS_BEFORE;

async function nameLab(): Promise<void> {
	const by = systemActor();
	const standard = await labSettings.get('lab');
	await record(by, (w) =>
		labSettings.put(w, by, 'lab', { ...standard, name: LAB_NAME, isDemo: true })
	);
}

async function addAnimal(cast: Cast, days: LabDays, animal: DemoAnimal): Promise<void> {
	const { code, sex, baselineWeightG, note, surgeryDaysAgo } = animal;
	await animals.create(
		cast.experimenter,
		{
			code,
			species: 'rat',
			strain: 'invented',
			sex,
			birthDate: days.date(surgeryDaysAgo + 110),
			source: 'simulated',
			baselineWeightG,
			note,
			protocol: PROTOCOL,
			project: PROJECT,
			memberSince: days.date(surgeryDaysAgo + DAYS_BEFORE)
		},
		{ isSimulated: true }
	);
}

const atMoment: AtMoment = async (moment, work) => {
	const restore = setClock(() => moment);
	try {
		return await work();
	} finally {
		restore();
	}
};

function inTwoYears(from: Date): string {
	return `${from.getUTCFullYear() + 2}-12-31`;
}
