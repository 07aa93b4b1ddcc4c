import type { Step } from '../advice';
import type { AdviceParameters } from '../parameters';
import { verdict, type Rule, type Ruling, type View } from './rule';

/** Screws are read in eighths. */
const EIGHTH = 1 / 8;

/**
 * 3. On the way to its layer, until a person confirms it is there: half turns far away, quarters
 * nearer, eighths at the end and only after listening since the last move. No more than the daily
 * limit, all moves of the day added up.
 */
export const lowering: Rule = {
	number: 3,
	name: 'lowering',
	apply(view) {
		const { bundle, asking } = view;
		const { isInLayer, layerDepthUm, depthUm, moves } = bundle;
		if (isInLayer) return { inputs: { isInLayer }, verdict: null };
		const last = moves.findLast((move) => move.atH <= asking.atH);
		const movedToday = moves.filter((move) => move.day === asking.day && move.atH <= asking.atH);
		const place = bundle.landmarks.findLast(
			({ atH }) => atH <= asking.atH && atH > (last?.atH ?? -Infinity)
		)?.place;
		const situation: Situation = {
			toLayerUm: layerDepthUm === null ? null : layerDepthUm - depthUm,
			sinceMoveH: last ? asking.atH - last.atH : null,
			movedTodayUm: movedToday.reduce((sum, { um }) => sum + Math.abs(um), 0),
			landmark: place ?? null
		};
		return {
			inputs: { isInLayer, travelLeftUm: bundle.travelLeftUm, ...situation },
			verdict: decide(view, situation)
		};
	}
};

interface Situation {
	readonly toLayerUm: number | null;
	readonly sinceMoveH: number | null;
	readonly movedTodayUm: number;
	/** Latest since the last move. */
	readonly landmark: string | null;
}

function decide(view: View, situation: Situation): Ruling['verdict'] {
	const { bundle, asking, parameters } = view;
	const { toLayerUm, sinceMoveH, movedTodayUm, landmark } = situation;
	if (toLayerUm === null) return verdict('watch', 'layer-unknown', 'person');
	const most = largestStep(toLayerUm, bundle.pitchUm, parameters);
	const step = within(most, parameters.dailyLimitUm - movedTodayUm, bundle.pitchUm);
	if (bundle.travelLeftUm < (step ?? most).um + parameters.reserveUm) {
		return verdict('no-travel', 'no-travel', 'new-drive');
	}
	if (sinceMoveH !== null && sinceMoveH < parameters.loweringRestH) {
		const restedAtH = asking.atH - sinceMoveH + parameters.loweringRestH;
		return verdict('settling', 'settling', 'time', restedAtH);
	}
	if (!step) return verdict('settling', 'daily-limit', 'time');
	if (landmark === 'below' || toLayerUm < -parameters.nearUm) {
		return verdict('watch', 'below-layer', 'person');
	}
	if (landmark === 'in') return verdict('watch', 'confirm-layer', 'person');
	if (toLayerUm <= parameters.nearUm && landmark === null) {
		return verdict('watch', 'listen-first', 'landmark');
	}
	// The last stretch is only for a tip that is clearly heard to be above.
	if (toLayerUm <= parameters.nearUm / 2 && landmark !== 'above') {
		return verdict('watch', 'unclear-landmarks', 'landmark');
	}
	return verdict('advance', 'lowering', 'landmark', null, step);
}

function largestStep(toLayerUm: number, pitchUm: number, parameters: AdviceParameters): Step {
	const { farUm, nearUm, nearStepUm } = parameters;
	if (toLayerUm > farUm) return { um: pitchUm / 2, turns: 0.5 };
	if (toLayerUm > nearUm) return { um: pitchUm / 4, turns: 0.25 };
	const um = Math.min(pitchUm * EIGHTH, nearStepUm);
	return { um, turns: um / pitchUm };
}

/** The step cut to whole eighths of a turn that today's travel allows; null when none is left. */
function within(most: Step, allowedUm: number, pitchUm: number): Step | null {
	if (most.um <= allowedUm) return most;
	const eighths = Math.floor(allowedUm / (pitchUm * EIGHTH));
	return eighths >= 1 ? { um: eighths * EIGHTH * pitchUm, turns: eighths * EIGHTH } : null;
}
