import { advise } from '../../../src/lib/analysis/advice/advise';
import type { BundleHistory, Landmark, Move } from '../../../src/lib/analysis/advice/history';
import { ADVICE_DEFAULTS } from '../../../src/lib/analysis/advice/parameters';
import type { ThresholdSource } from '../../../src/lib/analysis/advice/thresholds';
import { drawNormal } from '../../../src/lib/analysis/random/normal-draw';
import { seeded } from '../../../src/lib/analysis/random/seeded';

/** How one bundle came down. */
export interface Lowered {
	/** Days that the distance takes at the daily limit. */
	readonly planDays: number;
	/** Days after which a person confirmed the layer; NaN when it was not reached. */
	readonly takenDays: number;
	/** Advances advised while the tip stood below the true layer. */
	readonly below: number;
	/** Largest travel of one day, µm. */
	readonly mostADayUm: number;
}

const START_UM = 300;
/** The layer lies this far from where the atlas says, standard deviation. */
const LAYER_SD_UM = 80;
/** Heard as "in" this close to the layer. */
const LAYER_HALF_UM = 50;
const RIGHT_SHARE = 0.85;
const HOURS = [9, 11, 13, 15, 17, 19];

/**
 * A bundle of a fresh implant, asked about six times a day; the person does what is advised, listens
 * whenever asked to and after every move near the layer, and confirms when told to look.
 */
export function lowerBundle(seed: number, thresholds: ThresholdSource): Lowered {
	const random = seeded(seed, 'lowering');
	const expectedUm = 1500 + 800 * random.next();
	const layerUm = expectedUm + LAYER_SD_UM * drawNormal(random);
	const planDays = Math.ceil((expectedUm - START_UM) / ADVICE_DEFAULTS.dailyLimitUm);
	const moves: Move[] = [];
	const landmarks: Landmark[] = [];
	let depthUm = START_UM;
	let below = 0;
	let takenDays = NaN;
	const listen = (day: number, atH: number) => {
		const off = depthUm - layerUm;
		const place = off < -LAYER_HALF_UM ? 'above' : off > LAYER_HALF_UM ? 'below' : 'in';
		landmarks.push({ day, atH, place: random.next() < RIGHT_SHARE ? place : 'unclear' });
	};
	for (let day = 0; day < planDays + 20 && Number.isNaN(takenDays); day++) {
		for (const hour of HOURS) {
			const atH = day * 24 + hour;
			const bundle: BundleHistory = {
				bundle: 'T01',
				role: 'record',
				kind: 'tetrode',
				isParked: false,
				isInLayer: false,
				depthUm,
				layerDepthUm: expectedUm,
				travelLeftUm: 5000 - depthUm,
				pitchUm: 317.5,
				moves,
				days: [],
				landmarks,
				impedances: [],
				worths: []
			};
			const animal = { bundles: [bundle], hasDecodingAlarm: false, advances: [], neighbours: [] };
			const asking = { day, atH, nextCriticalAtH: null };
			const [{ state, reason, step }] = advise(animal, asking, { thresholds });
			if (state === 'advance' && step) {
				if (depthUm - layerUm > LAYER_HALF_UM) below++;
				depthUm += step.um;
				moves.push({ atH, day, um: step.um });
				if (expectedUm - depthUm < ADVICE_DEFAULTS.nearUm) listen(day, atH + 1);
			} else if (reason === 'confirm-layer') {
				takenDays = day + 1;
				break;
			} else if (reason === 'listen-first' || reason === 'unclear-landmarks') {
				listen(day, atH + 1);
			}
		}
	}
	const byDay = new Map<number, number>();
	for (const { day, um } of moves) byDay.set(day, (byDay.get(day) ?? 0) + um);
	return { planDays, takenDays, below, mostADayUm: Math.max(...byDay.values()) };
}
