import { blockEvidence } from '../decoding/block-evidence';
import { decodeWindows, type Decoded } from '../decoding/decode-windows';
import { foldModels } from '../decoding/fold-models';
import { foldsOf, type Fold } from '../decoding/folds';
import { memoryFilter } from '../decoding/memory-filter';
import { posteriorStore, type PosteriorStore } from '../decoding/posterior-store';
import { randomWalk, type Walk } from '../decoding/random-walk';
import type { RateModel } from '../decoding/rate-model';
import { rmsStepCm, windowsBetween } from '../decoding/walk-steps';
import { windowCounts, type WindowCounts } from '../decoding/window-counts';
import { windowsOf, type Windows } from '../decoding/windows';
import { mapInput } from './analyse-units';
import type { SessionParameters } from './parameters';
import type { Ground, Path, UnitSpikes } from './prepared';

/** Units with fewer used spikes do not decode. */
export const LEAST_SPIKES = 30;
/** A hole of more windows than this makes the decoder with memory begin anew. */
const LONGEST_HOLE = 40;

/** Everything decoded of a session, window by window. */
export interface DecodedSession {
	readonly units: readonly UnitSpikes[];
	readonly windows: Windows;
	readonly windowS: number;
	readonly counts: WindowCounts;
	readonly folds: readonly Fold[];
	readonly models: readonly (RateModel | null)[];
	readonly trueBin: Int32Array;
	/** Decoder without memory. */
	readonly decoded: Decoded;
	/** Bins the decoder with memory answers; −1 where it cannot. */
	readonly memoryBin: Int32Array;
	readonly posterior: PosteriorStore;
	/** Distance in cm between a bin's centre and where the animal is at a window's middle. */
	readonly errorCm: (bin: number, window: number) => number;
}

/**
 * Cross-validated decoding of a session by contiguous folds, with and without memory.
 * @returns null when no unit has enough spikes, there are fewer windows than folds, or the training
 * data of a fold leave nowhere to answer
 */
export function decodeSession(
	ground: Ground,
	path: Path,
	all: readonly UnitSpikes[],
	parameters: SessionParameters,
	windows: Windows,
	onFold: (done: number) => void
): DecodedSession | null {
	const units = all.filter(({ used }) => used >= LEAST_SPIKES);
	if (units.length === 0 || windows.startS.length < parameters.folds) return null;
	const windowS = windows.lengthS;
	const folds = foldsOf(windows, parameters.folds);
	const models = foldModels(
		mapInput(ground, path),
		path.tS,
		path.isUsed,
		units.map(({ samples }) => samples),
		folds,
		parameters.prior
	);
	if (models.includes(null)) return null;
	const counts = windowCounts(
		windows,
		units.map(({ timesS }) => timesS)
	);
	const count = windows.startS.length;
	const trueBin = Int32Array.from(windows.sample, (i) => path.bin[i]);
	const decoded: Decoded = {
		bin: new Int32Array(count).fill(-1),
		log2AtTrue: new Float64Array(count).fill(NaN),
		isCovered: new Uint8Array(count)
	};
	const memoryBin = new Int32Array(count).fill(-1);
	const posterior = posteriorStore(count, ground.bins.count);
	const evidenceOf = blockEvidence();
	folds.forEach((fold, f) => {
		const model = models[f];
		if (!model) return;
		const remember = memoryOf(ground, path, windows, fold, model);
		const each = (w: number, evidence: Float64Array) => {
			if (remember) memoryBin[w] = model.bin[remember(w, evidence)];
		};
		decodeWindows(
			...([model, fold, counts, windowS, trueBin, decoded, posterior, each, evidenceOf] as const)
		);
		onFold(f + 1);
	});
	const { centreXCm, centreYCm } = ground.bins;
	const errorCm = (bin: number, window: number) => {
		const i = windows.sample[window];
		return ground.metric(centreXCm[bin], centreYCm[bin], path.xCm[i], path.yCm[i]);
	};
	return {
		units,
		windows,
		windowS,
		counts,
		folds,
		models,
		trueBin,
		decoded,
		memoryBin,
		posterior,
		errorCm
	};
}

/** Windows of the used samples of a path. */
export function sessionWindows(path: Path, windowMs: number): Windows {
	return windowsOf(path.tS, path.standS, path.stretch, path.isUsed, windowMs / 1000);
}

/**
 * The decoder with memory for one fold. The walk's σ is the root-mean-square step of the training
 * windows; over a hole of g windows its variance grows g-fold.
 */
function memoryOf(
	ground: Ground,
	path: Path,
	windows: Windows,
	fold: Fold,
	model: RateModel
): ((window: number, evidence: Float64Array) => number) | null {
	const isTraining = (w: number) => w < fold.from || w >= fold.to;
	const stepCm = rmsStepCm(windows, path.xCm, path.yCm, ground.metric, isTraining);
	if (!(stepCm > 0)) return null;
	const sigmaCm = Math.max(stepCm, ground.bins.binCm / 2);
	const walks = new Map<number, Walk>();
	const walkOver = (hole: number): Walk => {
		const known = walks.get(hole);
		if (known) return known;
		const walk = randomWalk(ground.bins, model.bin, ground.metric, sigmaCm * Math.sqrt(hole));
		walks.set(hole, walk);
		return walk;
	};
	const filter = memoryFilter(model.logPrior);
	return (w, evidence) => {
		const hole = w === fold.from ? Infinity : windowsBetween(windows, w - 1, w);
		return filter.step(evidence, hole <= LONGEST_HOLE ? walkOver(hole) : null);
	};
}
