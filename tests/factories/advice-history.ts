import type {
	AnimalHistory,
	Asking,
	BundleHistory,
	Landmark,
	LandmarkPlace,
	Move,
	RecordedDay
} from '../../src/lib/analysis/advice/history';

/** A day counted at 10 o'clock; units not matched unless the test says so. */
export function recordedDay(
	day: number,
	units: number,
	over: Partial<RecordedDay> = {}
): RecordedDay {
	return {
		day,
		atH: day * 24 + 10,
		units,
		kept: null,
		lnAmplitude: null,
		passing: null,
		setup: 'one',
		isLeftOut: false,
		isByEye: false,
		reader: 'A',
		...over
	};
}

/** Days one after another from day 0. */
export function recordedDays(units: readonly number[]): RecordedDay[] {
	return units.map((n, day) => recordedDay(day, n));
}

/** Six units for twelve days. */
export const STEADY = [6, 7, 6, 5, 6, 6, 7, 6, 5, 6, 6, 6];
/** The same, then all but one lost in four days. */
export const FALLEN = [...STEADY, 3, 2, 1, 1];

export function landmark(day: number, place: LandmarkPlace): Landmark {
	return { day, atH: day * 24 + 11, place };
}

export function move(day: number, hour: number, um: number): Move {
	return { day, atH: day * 24 + hour, um };
}

/** A tetrode in its layer that yields six units. */
export function bundleHistory(over: Partial<BundleHistory> = {}): BundleHistory {
	return {
		bundle: 'T01',
		role: 'record',
		kind: 'tetrode',
		isParked: false,
		isInLayer: true,
		depthUm: 2000,
		layerDepthUm: 2000,
		travelLeftUm: 2000,
		pitchUm: 317.5,
		moves: [],
		days: recordedDays(STEADY),
		landmarks: [],
		impedances: [],
		worths: [],
		...over
	};
}

/** A tetrode that has lost its units while its tip is heard above the layer. */
export function fallenBundle(over: Partial<BundleHistory> = {}): BundleHistory {
	return bundleHistory({
		days: recordedDays(FALLEN),
		landmarks: [landmark(FALLEN.length - 1, 'above')],
		...over
	});
}

export function animalHistory(
	bundles: readonly BundleHistory[],
	over: Partial<AnimalHistory> = {}
): AnimalHistory {
	return { bundles, hasDecodingAlarm: false, advances: [], neighbours: [], ...over };
}

/** At noon. */
export function asking(day: number, over: Partial<Asking> = {}): Asking {
	return { day, atH: day * 24 + 12, nextCriticalAtH: null, ...over };
}
