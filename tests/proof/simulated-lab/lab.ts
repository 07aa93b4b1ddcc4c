import { advise } from '../../../src/lib/analysis/advice/advise';
import type { Advice } from '../../../src/lib/analysis/advice/advice';
import { followDay, NOTHING_FOLLOWED } from '../../../src/lib/analysis/advice/follow';
import type {
	AnimalHistory,
	BundleHistory,
	EarlierAdvance,
	Move
} from '../../../src/lib/analysis/advice/history';
import type { AdviceParameters } from '../../../src/lib/analysis/advice/parameters';
import type { ThresholdSource } from '../../../src/lib/analysis/advice/thresholds';
import { seeded } from '../../../src/lib/analysis/random/seeded';
import type { Baseline } from '../../../src/lib/analysis/trends/bundle-baseline';
import { nextFall, startFall } from '../../../src/lib/analysis/trends/fall-chart';
import type { YieldModel } from '../../../src/lib/analysis/trends/yield-model';
import { listen, live, recordDay, simBundle, type Listening, type Truth } from './bundle';

export interface Plan {
	readonly bundles: number;
	readonly days: number;
	/** First day on which advice is asked for. */
	readonly askFrom: number;
	readonly usual: (bundle: number) => YieldModel;
	/** What is true of a bundle on a day, before anyone moves it. */
	readonly truth: (bundle: number, day: number) => Truth;
	/** Share of the units that are seen that day. */
	readonly seenShare: (day: number) => number;
	readonly isByEye: boolean;
	readonly reader: (day: number) => string;
	/** Chance that a day is not recorded at all. */
	readonly missingShare: number;
	readonly listening: Listening;
	readonly parameters: AdviceParameters;
	/** Whether advances are carried out. */
	readonly isFollowed: boolean;
}

export interface LabDay {
	readonly day: number;
	readonly isRecorded: boolean;
	readonly advice: readonly Advice[];
	/** True units of each bundle. */
	readonly units: readonly number[];
}

/** An animal in a layer, day by day: lived, recorded, advised on, and moved when advised. */
export function simulateAnimal(plan: Plan, seed: number, thresholds: ThresholdSource): LabDay[] {
	const random = seeded(seed, 'simulated animal');
	const sims = Array.from({ length: plan.bundles }, (_, b) => simBundle(plan.usual(b), random));
	const moves: Move[][] = sims.map(() => []);
	const advances: EarlierAdvance[] = [];
	const days: LabDay[] = [];
	let followed = NOTHING_FOLLOWED;
	for (let day = 0; day < plan.days; day++) {
		const isRecorded = random.next() >= plan.missingShare;
		const recording = {
			day,
			atH: day * 24 + 10,
			seenShare: plan.seenShare(day),
			isByEye: plan.isByEye,
			isLeftOut: false,
			reader: plan.reader(day)
		};
		sims.forEach((sim, b) => {
			const truth =
				moves[b].length > 0
					? { model: plan.usual(b), level: 0, place: 'in' as const }
					: plan.truth(b, day);
			Object.assign(sim, live(sim, truth));
			if (!isRecorded) return;
			recordDay(sim, recording);
			listen(sim, truth.place, recording, plan.listening);
		});
		const asking = { day, atH: day * 24 + 12, nextCriticalAtH: null };
		const animal: AnimalHistory = {
			bundles: sims.map((sim, b): BundleHistory => ({
				bundle: nameOf(b),
				role: 'record',
				kind: 'tetrode',
				isParked: false,
				isInLayer: true,
				depthUm: 2000,
				layerDepthUm: 2000,
				travelLeftUm: 3000,
				pitchUm: 317.5,
				moves: moves[b],
				days: sim.days,
				landmarks: sim.landmarks,
				impedances: [],
				worths: sim.worths
			})),
			hasDecodingAlarm: false,
			advances,
			neighbours: []
		};
		if (isRecorded) followed = followDay(followed, animal, day, plan.parameters);
		const isAsked = isRecorded && day >= plan.askFrom;
		const advice = isAsked
			? advise(animal, asking, { parameters: plan.parameters, thresholds, followed })
			: [];
		const units = sims.map((sim) => sim.units.length);
		if (plan.isFollowed) follow(advice, asking.atH + 1, moves, advances);
		days.push({ day, isRecorded, advice, units });
	}
	return days;
}

function follow(
	advice: readonly Advice[],
	atH: number,
	moves: Move[][],
	advances: EarlierAdvance[]
): void {
	advice.forEach(({ state, step, day, bundle }, b) => {
		if (state !== 'advance' || !step) return;
		moves[b].push({ atH, day, um: step.um });
		advances.push({ bundle, day });
	});
}

export function nameOf(bundle: number): string {
	return `T${String(bundle + 1).padStart(2, '0')}`;
}

/** What the bundles of a plan teach in sixteen recorded days. */
export function learntBaselines(plan: Plan, seed: number): Baseline[] {
	const random = seeded(seed, 'earlier animal');
	return Array.from({ length: plan.bundles }, (_, b) => {
		const sim = simBundle(plan.usual(b), random);
		let state = startFall();
		for (let day = 0; day < 16; day++) {
			Object.assign(sim, live(sim, plan.truth(b, day)));
			recordDay(sim, {
				day,
				atH: day * 24,
				seenShare: 1,
				isByEye: false,
				isLeftOut: false,
				reader: 'A'
			});
			const { units, kept } = sim.days[day];
			state = nextFall(state, { day, units, kept, lnAmplitude: NaN });
		}
		return state.baseline;
	});
}
