import { drawNormal } from '$lib/analysis/random/normal-draw';
import { seeded } from '$lib/analysis/random/seeded';
import type { SharpWave } from '$lib/schemas/enumerations';
import { PLACES, REFERENCE, TETRODES, type DemoAnimal, type DemoSession } from './animals';
import { between } from './simulate/between';
import type { TrueCell } from './simulate/cell';
import { cellsOfDay } from './simulate/population';

/** What is done with one animal on one day; times by the lab's clock. */
export interface DayPlan {
	weight: { time: string; netG: number };
	turns: { time: string; bundle: string; turns: number; reason: string }[];
	landmarks: { bundle: string; ripples: number; sharpWave: SharpWave; hasCells: boolean }[];
	/** Counts by eye; a bundle without a row was not counted. */
	tallies: {
		bundle: string;
		principal: number;
		interneuron: number;
		medianAmplitudeUv: number | null;
	}[];
	sessions: (DemoSession & { cells: TrueCell[]; seed: number })[];
}

const clock = (minute: number) =>
	`${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;

/** Plans a day of a demo animal from its story; the same story gives the same plan. */
export function planDay(animal: DemoAnimal, daysAgo: number): DayPlan {
	const dayNumber = animal.surgeryDaysAgo - daysAgo;
	const random = seeded(animal.story.seed, `day ${dayNumber}`);
	const recorded = animal.recordedDays - 1 - daysAgo;
	const isRecorded = recorded >= 0;
	return {
		weight: { time: clock(8 * 60 + 10), netG: netWeightG(animal, dayNumber, drawNormal(random)) },
		turns: turnsOf(animal, dayNumber, daysAgo),
		landmarks: isRecorded || dayNumber < 1 ? [] : landmarksOf(animal, dayNumber),
		tallies: isRecorded ? talliesOf(animal, recorded) : [],
		sessions: animal.sessions
			.filter(({ everyDays }) => isRecorded && recorded % everyDays === 0)
			.map((session) => ({
				...session,
				cells: cellsOfDay(animal.story, recorded, PLACES[session.place]),
				seed: animal.story.seed * 100 + recorded
			}))
	};
}

/** Dips after surgery, recovers, and is then held a little below the baseline; never near the floor. */
function netWeightG(animal: DemoAnimal, dayNumber: number, noise: number): number {
	const dip = dayNumber > 0 ? 0.05 * Math.exp(-dayNumber / 3) : 0;
	const held = 0.06 * Math.min(1, Math.max(0, dayNumber - 4) / 5);
	const share = 1 - dip - held + 0.004 * noise;
	return Math.round(animal.baselineWeightG * share * 10) / 10;
}

function turnsOf(animal: DemoAnimal, dayNumber: number, daysAgo: number): DayPlan['turns'] {
	const step = animal.lowering[dayNumber - 1] ?? 0;
	const lowered = TETRODES.filter(() => step > 0).map((bundle, i) => ({
		time: clock(9 * 60 + 2 * i),
		bundle,
		// The reference stops early, in quiet tissue above the layer.
		turns: bundle === REFERENCE ? (dayNumber <= 2 ? 0.5 : 0) : step,
		reason: 'lowering'
	}));
	const moved = animal.moves
		.filter((move) => move.daysAgo === daysAgo)
		.map(({ bundle, turns }) => ({
			time: clock(11 * 60 + 30),
			bundle,
			turns,
			reason: 'no units left'
		}));
	return [...lowered, ...moved].filter(({ turns }) => turns !== 0);
}

/** Ripples grow on the way down; the sharp wave flattens as the tips come to the layer. */
function landmarksOf(animal: DemoAnimal, dayNumber: number): DayPlan['landmarks'] {
	const random = seeded(animal.story.seed, `landmarks ${dayNumber}`);
	return TETRODES.filter((bundle) => bundle !== REFERENCE).map((bundle) => {
		const way = dayNumber / 8 + between(random, -0.15, 0.15);
		return {
			bundle,
			ripples: Math.max(0, Math.min(3, Math.round(3.2 * way))),
			sharpWave: way > 0.85 ? 'flat' : 'positive',
			hasCells: way > 0.9
		};
	});
}

/** A careful count misses small spikes and is sometimes one off. */
function talliesOf(animal: DemoAnimal, recorded: number): DayPlan['tallies'] {
	const random = seeded(animal.story.seed, `tally ${recorded}`);
	const cells = cellsOfDay(animal.story, recorded, PLACES.track);
	return animal.story.bundles.map((bundle) => {
		const seen = cells.filter((cell) => cell.bundle === bundle && cell.amplitudeUv > 60);
		const principal = seen.filter(({ kind }) => kind === 'principal').length;
		const off = principal > 0 && random.next() < 0.2 ? random.below(3) - 1 : 0;
		const amplitudes = seen.map(({ amplitudeUv }) => amplitudeUv).sort((a, b) => a - b);
		const median = amplitudes[Math.floor(amplitudes.length / 2)];
		return {
			bundle,
			principal: principal + off,
			interneuron: seen.length - principal,
			medianAmplitudeUv: median === undefined ? null : Math.round(median)
		};
	});
}
