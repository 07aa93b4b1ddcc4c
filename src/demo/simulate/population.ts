import { drawNormal } from '$lib/analysis/random/normal-draw';
import { seeded, type Random } from '$lib/analysis/random/seeded';
import type { TrueCell, TrueField } from './cell';
import { between } from './between';

/** How a bundle's cells come and go. Days count from the first recorded one. */
export interface Story {
	readonly seed: number;
	readonly bundles: readonly string[];
	/** Cells that a bundle of this place in the list shows at a time. */
	readonly cellsPerBundle: readonly number[];
	readonly days: number;
	/** Share of a bundle's cells that are replaced from one day to the next. */
	readonly turnover: number;
	/** Standard deviation of a field's move from day to day, cm. */
	readonly fieldDriftCm: number;
	/** Bundles that fall silent: amplitudes shrink to this day, from which on no cell is seen. */
	readonly silentFrom: Readonly<Record<string, number>>;
}

/** Where the cells are looked at; each arena has fields of its own. */
export interface Place {
	readonly name: string;
	readonly widthCm: number;
	/** Null on a track. */
	readonly heightCm: number | null;
}

interface Life {
	name: string;
	bundle: string;
	fromDay: number;
	untilDay: number;
}

/** Every cell of a story with the days on which its bundle shows it. */
function lives(story: Story): Life[] {
	return story.bundles.flatMap((bundle, b) => {
		const random = seeded(story.seed, `lives ${bundle}`);
		const end = Math.min(story.days, story.silentFrom[bundle] ?? story.days);
		const all: Life[] = [];
		for (let slot = 0; slot < story.cellsPerBundle[b]; slot++) {
			let fromDay = 0;
			for (let day = 1; day <= end; day++) {
				if (day < end && random.next() >= story.turnover) continue;
				all.push({ name: `${bundle}/${slot}/${fromDay}`, bundle, fromDay, untilDay: day });
				fromDay = day;
			}
		}
		return all;
	});
}

/** The true cells of one day in one arena. The same story always gives the same cells. */
export function cellsOfDay(story: Story, day: number, place: Place): TrueCell[] {
	return lives(story)
		.filter(({ fromDay, untilDay }) => fromDay <= day && day < untilDay)
		.map((life) => cellOf(story, life, day, place));
}

function cellOf(story: Story, life: Life, day: number, place: Place): TrueCell {
	const nature = seeded(story.seed, `nature ${life.name}`);
	const kind = nature.next() < 0.08 ? 'interneuron' : 'principal';
	const amplitudeUv = between(nature, 90, 260) * fading(story, life.bundle, day);
	const base = { name: life.name, bundle: life.bundle, kind, amplitudeUv } as const;
	const fieldsHere = seeded(story.seed, `fields ${life.name} ${place.name}`);
	if (kind === 'interneuron') {
		const wide = { ...drawField(fieldsHere, place), sigmaCm: 60, peakHz: 6, heading: 0 as const };
		return { ...base, baseHz: between(nature, 8, 14), fields: [wide] };
	}
	const count = fieldsHere.next() < 0.8 ? 1 : 2;
	const fields = Array.from({ length: count }, () => drawField(fieldsHere, place));
	const moves = seeded(story.seed, `moves ${life.name} ${place.name}`);
	const moved = fields.map((field) => drifted(field, day, story.fieldDriftCm, place, moves));
	return { ...base, baseHz: between(nature, 0.05, 0.3), fields: moved };
}

/** A silent bundle's spikes sink into the noise over the three days before. */
function fading(story: Story, bundle: string, day: number): number {
	const silent = story.silentFrom[bundle];
	return silent === undefined ? 1 : Math.min(1, 0.35 + 0.22 * (silent - day));
}

function drawField(random: Random, { widthCm, heightCm }: Place): TrueField {
	const isTrack = heightCm === null;
	return {
		xCm: between(random, 0.04, 0.96) * widthCm,
		yCm: isTrack ? null : between(random, 0.06, 0.94) * heightCm,
		sigmaCm: isTrack ? between(random, 9, 16) : between(random, 8, 13),
		peakHz: between(random, 8, 26),
		heading: isTrack ? ([-1, 0, 1] as const)[random.below(3)] : 0
	};
}

function drifted(
	field: TrueField,
	day: number,
	driftCm: number,
	{ widthCm, heightCm }: Place,
	random: Random
): TrueField {
	let { xCm, yCm } = field;
	for (let step = 0; step < day; step++) {
		xCm += driftCm * drawNormal(random);
		if (yCm !== null) yCm += driftCm * drawNormal(random);
	}
	const within = (cm: number, lengthCm: number) => Math.min(Math.max(cm, 0), lengthCm);
	return {
		...field,
		xCm: within(xCm, widthCm),
		yCm: yCm === null || heightCm === null ? null : within(yCm, heightCm)
	};
}
