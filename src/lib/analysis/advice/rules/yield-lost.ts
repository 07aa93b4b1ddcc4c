import { standardStep } from '../standard-step';
import { hasLittleLeft } from './little-left';
import { verdict, type Rule, type Ruling, type View } from './rule';

/** 7. The yield has fallen and the bundle no longer serves: an advance, if its tip is above the layer. */
export const yieldLost: Rule = {
	number: 7,
	name: 'yield lost',
	apply(view) {
		const { statistic, advanceAt, units, worth, tallies, landmark } = view.evidence;
		const isLost =
			statistic >= advanceAt &&
			hasLittleLeft(view.evidence, view.parameters) &&
			tallies >= view.parameters.advanceTallies;
		const { nextCriticalAtH } = view.asking;
		return {
			inputs: {
				statistic,
				advanceAt,
				units,
				worthHigh: worth?.high ?? null,
				tallies,
				landmark,
				travelLeftUm: view.bundle.travelLeftUm,
				nextCriticalAtH
			},
			verdict: isLost ? decide(view) : null
		};
	}
};

/** Tissue rebounds after moves: cells often vanish because the tip is too deep, so listen first. */
function decide({ bundle, asking, evidence, parameters }: View): Ruling['verdict'] {
	if (evidence.landmark === null) return verdict('watch', 'listen-first', 'landmark');
	if (evidence.landmark === 'below') return verdict('watch', 'below-layer', 'person');
	if (evidence.landmark !== 'above') return verdict('watch', 'unclear-landmarks', 'landmark');
	const step = standardStep(bundle.pitchUm, parameters);
	if (bundle.travelLeftUm < step.um + parameters.reserveUm) {
		return verdict('no-travel', 'no-travel', 'new-drive');
	}
	const criticalAtH = asking.nextCriticalAtH;
	if (
		criticalAtH !== null &&
		criticalAtH >= asking.atH &&
		criticalAtH - asking.atH <= parameters.criticalH
	) {
		return verdict('watch', 'postponed', 'time', criticalAtH);
	}
	return verdict('advance', 'yield-lost', 'tallies', null, step);
}
