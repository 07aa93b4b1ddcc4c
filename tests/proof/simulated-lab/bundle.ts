import type {
	Landmark,
	LandmarkPlace,
	RecordedDay,
	Worth
} from '../../../src/lib/analysis/advice/history';
import { drawNormal } from '../../../src/lib/analysis/random/normal-draw';
import { drawPoisson } from '../../../src/lib/analysis/random/poisson-draw';
import type { Random } from '../../../src/lib/analysis/random/seeded';
import { AMPLITUDE } from '../../../src/lib/analysis/trends/amplitude-evidence';
import { stationaryMean, type YieldModel } from '../../../src/lib/analysis/trends/yield-model';

/** What is true of a bundle on a day; nobody in the lab sees it. */
export interface Truth {
	readonly model: YieldModel;
	/** ln amplitude relative to its usual level. */
	readonly level: number;
	readonly place: LandmarkPlace;
}

interface Unit {
	readonly worthBits: number;
	/** 0 the loudest, 1 the faintest: what a bad day or a strict reader misses first. */
	readonly faintness: number;
	/** Recorded on the bundle's last recorded day. */
	isKnown: boolean;
}

/** A bundle whose units come, stay and go; the lab's records of it pile up. */
export interface SimBundle {
	readonly random: Random;
	units: Unit[];
	lnAmplitude: number;
	readonly days: RecordedDay[];
	readonly landmarks: Landmark[];
	readonly worths: Worth[];
}

/** Four in ten units say nothing of place; the others add 0.05 bits a window on average. */
const SILENT_SHARE = 0.4;
const MEAN_WORTH_BITS = 0.05;
const WORTH_SD = 0.006;
/** 1.645 standard deviations each way make a 90 % interval. */
const WORTH_REACH = 1.645 * WORTH_SD;
const USUAL_LN_UV = 5;

export function simBundle(model: YieldModel, random: Random): SimBundle {
	const count = drawPoisson(stationaryMean(model), random);
	return {
		random,
		units: Array.from({ length: count }, () => newUnit(random)),
		lnAmplitude: (drawNormal(random) * AMPLITUDE.sd) / Math.sqrt(1 - AMPLITUDE.phi ** 2),
		days: [],
		landmarks: [],
		worths: []
	};
}

function newUnit(random: Random): Unit {
	const isSilent = random.next() < SILENT_SHARE;
	const mean = MEAN_WORTH_BITS / (1 - SILENT_SHARE);
	return {
		worthBits: isSilent ? 0 : -mean * Math.log(1 - random.next()),
		faintness: random.next(),
		isKnown: false
	};
}

/** A night passes. */
export function live({ units, random, ...rest }: SimBundle, { model, level }: Truth): Living {
	const stayed = units.filter(() => random.next() < model.survival);
	const fresh = Array.from({ length: drawPoisson(model.arrivals, random) }, () => newUnit(random));
	const deviation = AMPLITUDE.phi * (rest.lnAmplitude - level) + AMPLITUDE.sd * drawNormal(random);
	return { units: [...stayed, ...fresh], lnAmplitude: level + deviation };
}

type Living = Pick<SimBundle, 'units' | 'lnAmplitude'>;

export interface Recording {
	readonly day: number;
	readonly atH: number;
	/** Share of the units that the equipment or the reader lets through. */
	readonly seenShare: number;
	readonly isByEye: boolean;
	readonly isLeftOut: boolean;
	readonly reader: string;
}

/** A day is recorded: what the lab writes down. */
export function recordDay(bundle: SimBundle, recording: Recording): void {
	const { random } = bundle;
	const { day, atH, seenShare, isByEye, isLeftOut, reader } = recording;
	const seen = bundle.units.filter(({ faintness }) => faintness < seenShare);
	const kept = seen.filter(({ isKnown }) => isKnown).length;
	const isFirst = bundle.days.length === 0;
	const hasAmplitude = !isByEye && seen.length > 0;
	bundle.days.push({
		day,
		atH,
		units: seen.length,
		kept: isByEye || isFirst ? null : kept,
		lnAmplitude: hasAmplitude ? USUAL_LN_UV + bundle.lnAmplitude : null,
		passing: null,
		setup: 'one',
		isLeftOut,
		isByEye,
		reader
	});
	const known = new Set(seen);
	for (const unit of bundle.units) unit.isKnown = known.has(unit);
	const bits =
		seen.reduce((sum, { worthBits }) => sum + worthBits, 0) + WORTH_SD * drawNormal(random);
	bundle.worths.push({
		day,
		arena: 'circle',
		bits,
		low: bits - WORTH_REACH,
		high: bits + WORTH_REACH
	});
}

/** How well a lab listens: how often it writes a row, and how often the row is right. */
export interface Listening {
	readonly rowShare: number;
	readonly rightShare: number;
}

export function listen(
	bundle: SimBundle,
	place: LandmarkPlace,
	{ day, atH }: Pick<Recording, 'day' | 'atH'>,
	{ rowShare, rightShare }: Listening
): void {
	const { random } = bundle;
	if (random.next() >= rowShare) return;
	const isRight = random.next() < rightShare;
	const others: LandmarkPlace[] = ['above', 'unclear', 'below'];
	bundle.landmarks.push({ day, atH, place: isRight ? place : others[random.below(3)] });
}
