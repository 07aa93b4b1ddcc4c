import type { Place, Story } from './simulate/population';

/** A session that a demo animal runs on each of its recorded days. */
export interface DemoSession {
	place: 'track' | 'box';
	/** Start by the lab's clock. */
	time: string;
	durationS: number;
	/** Left out on recorded days whose number does not divide by this. */
	everyDays: number;
}

/** One demo animal: who it is, how it was lowered, and what is recorded from it. */
export interface DemoAnimal {
	code: string;
	sex: 'female' | 'male';
	baselineWeightG: number;
	note: string;
	surgeryDaysAgo: number;
	driveSerial: string;
	/** Turns of every recording tetrode on D+1, D+2, … */
	lowering: number[];
	/** Further moves: on a day so long ago, of one bundle. */
	moves: { daysAgo: number; bundle: string; turns: number }[];
	/** Recorded days end with the last day of the lab; 0 for an animal still being lowered. */
	recordedDays: number;
	sessions: DemoSession[];
	story: Story;
}

export const PLACES: Record<'track' | 'box', Place> = {
	track: { name: 'track', widthCm: 300, heightCm: null },
	box: { name: 'box', widthCm: 100, heightCm: 80 }
};

/** The last tetrode stays in quiet tissue and serves as reference. */
export const TETRODES = Array.from({ length: 16 }, (_, i) => `T${String(i + 1).padStart(2, '0')}`);
export const REFERENCE = 'T16';

const recording = TETRODES.filter((label) => label !== REFERENCE);

/** Three and a quarter turns, the steps shrinking towards the layer. */
const LOWERING = [0.75, 0.75, 0.5, 0.5, 0.25, 0.25, 0.125, 0.125];

export const DEMO_ANIMALS: DemoAnimal[] = [
	{
		code: 'R031',
		sex: 'male',
		baselineWeightG: 432,
		note: 'Simulated. Its cells and fields stay from day to day.',
		surgeryDaysAgo: 17,
		driveSerial: 'SIM-D-01',
		lowering: LOWERING,
		moves: [],
		recordedDays: 8,
		sessions: [{ place: 'track', time: '10:05', durationS: 720, everyDays: 1 }],
		story: {
			seed: 3101,
			bundles: recording,
			cellsPerBundle: [3, 2, 4, 2, 3, 2, 1, 3, 2, 4, 2, 3, 2, 1, 3],
			days: 8,
			turnover: 0.03,
			fieldDriftCm: 1,
			silentFrom: {}
		}
	},
	{
		code: 'R034',
		sex: 'female',
		baselineWeightG: 318,
		note: 'Simulated. Its fields drift, cells come and go, and tetrode T05 falls silent.',
		surgeryDaysAgo: 14,
		driveSerial: 'SIM-D-02',
		lowering: LOWERING.slice(0, 7),
		moves: [{ daysAgo: 2, bundle: 'T05', turns: 0.125 }],
		recordedDays: 6,
		sessions: [
			{ place: 'track', time: '09:20', durationS: 720, everyDays: 1 },
			{ place: 'box', time: '10:40', durationS: 720, everyDays: 2 }
		],
		story: {
			seed: 3402,
			bundles: recording,
			cellsPerBundle: [2, 3, 2, 3, 4, 2, 2, 3, 1, 2, 3, 2, 2, 2, 1],
			days: 6,
			turnover: 0.15,
			fieldDriftCm: 8,
			silentFrom: { T05: 4 }
		}
	},
	{
		code: 'R036',
		sex: 'male',
		baselineWeightG: 405,
		note: 'Simulated. Fresh from surgery and still being lowered.',
		surgeryDaysAgo: 4,
		driveSerial: 'SIM-D-03',
		lowering: LOWERING.slice(0, 3),
		moves: [],
		recordedDays: 0,
		sessions: [],
		story: {
			seed: 3603,
			bundles: recording,
			cellsPerBundle: recording.map(() => 0),
			days: 0,
			turnover: 0,
			fieldDriftCm: 0,
			silentFrom: {}
		}
	}
];
