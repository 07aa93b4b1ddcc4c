import { Op } from 'sequelize';
import { daySchema } from '$lib/schemas/field-rules';
import type { DayState } from '$lib/schemas/enumerations';
import { demand, type Actor } from '$lib/server/access';
import { Conflict, Invalid, NotFound } from '$lib/server/errors';
import { Day } from '$lib/server/models/day';
import { Implant } from '$lib/server/models/implant';
import type { Write } from '$lib/server/record';
import { animalOfCode } from './animal-of-code';
import { labClock } from './lab-clock';

export interface DayRow {
	id: string;
	date: string;
	state: DayState;
	responsibleId: string | null;
}

/** The lab day of an animal as part of a write: found, or made as a draft. */
export async function open(w: Write, animalId: string, date: string): Promise<Day> {
	// Two writers may open the same day at once: the key decides, and both read the one row.
	await Day.bulkCreate([{ animalId, date }], { ignoreDuplicates: true, transaction: w.t });
	return Day.findOne({ where: { animalId, date }, rejectOnEmpty: true, transaction: w.t });
}

/** The same for what may not be added to a signed day. @throws Conflict `day-signed` */
export async function openDraft(w: Write, animalId: string, date: string): Promise<Day> {
	const day = await open(w, animalId, date);
	// Held until the write commits, so that nobody signs the day meanwhile.
	await day.reload({ transaction: w.t, lock: true });
	if (day.state === 'draft') return day;
	throw new Conflict(
		'day-signed',
		`The day ${date} is signed, so nothing was added to it. What came later is added as an amendment.`
	);
}

/** Days on which something was written, oldest first. */
export async function list(
	by: Actor | null,
	animalCode: string,
	{ from, to }: { from?: string; to?: string } = {}
): Promise<DayRow[]> {
	demand(by, 'data.read');
	const animal = await animalOfCode(animalCode);
	const within = { ...(from && { [Op.gte]: from }), ...(to && { [Op.lte]: to }) };
	const days = await Day.findAll({
		where: { animalId: animal.id, ...((from || to) && { date: within }) },
		order: [['date', 'ASC']]
	});
	return days.map(({ id, date, state, responsibleId }) => ({ id, date, state, responsibleId }));
}

/** One day; NotFound when nothing was written on it. */
export async function get(by: Actor | null, animalCode: string, date: string): Promise<DayRow> {
	const [day] = await list(by, animalCode, { from: date, to: date });
	if (!day) throw new NotFound(`Nothing is written on ${date} yet.`);
	return day;
}

/**
 * Checks a day that something is to be written on.
 * @throws Invalid when it is no date, lies ahead, or before the animal's first implant
 */
export async function checkDate(animalId: string, date: string): Promise<void> {
	const refuse = (message: string) => {
		throw new Invalid([{ field: 'date', message }]);
	};
	if (!daySchema.safeParse(date).success) refuse('Give a day as year-month-day, like 2026-04-09.');
	if (date > (await labClock()).today) refuse('This day has not begun yet.');
	const first = await Implant.min<string | null, Implant>('surgeryDay', {
		where: { animalId, withdrawnAt: null }
	});
	if (first !== null && date < first) refuse(`The first implant was made on ${first}.`);
}
