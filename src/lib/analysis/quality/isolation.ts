import { chiSquaredUpperTail } from '../statistics/chi-squared';
import { momentsOf, type Features } from './covariance';
import { liveDimensions } from './live-dimensions';
import { mahalanobis } from './mahalanobis';

/** How far a cluster stands from the other spikes of its bundle. */
export interface Isolation {
	/** Squared Mahalanobis distance; NaN with fewer spikes outside than inside. */
	readonly distance: number;
	/** NaN when there is no spike outside. */
	readonly lRatio: number;
	/** Dimensions the figures stand on; both depend on their number. */
	readonly dimensionsUsed: number;
	/** Dimensions left out because over all spikes they are constant or follow from earlier ones. */
	readonly deadDimensions: readonly number[];
	readonly undefinedBecause:
		'too-few-spikes' | 'singular' | 'none-outside' | 'fewer-outside' | null;
}

/**
 * Isolation distance and L-ratio. D² is the squared Mahalanobis distance with the cluster's mean and
 * covariance (n − 1). With n cluster spikes the isolation distance is the n-th smallest D² among the
 * spikes outside (Harris et al. 2001), the L-ratio 1/n Σ Q(D²) over the spikes outside, Q the upper
 * tail of χ² with as many degrees of freedom as dimensions (Schmitzer-Torbert et al. 2005).
 *
 * Dimensions of dead wires are dropped and told. The figures are NaN when the cluster has no more
 * spikes than dimensions are left, or is flat in a direction in which other spikes vary.
 * Compare only within one fixed recipe of features.
 * @param outside every other spike of the bundle, noise included
 * @throws RangeError dimensions differ, or a value is not finite
 * Cost: O(spikes · dimensions² + outside · log outside).
 */
export function isolation(cluster: Features, outside: Features): Isolation {
	const { dimensions } = cluster;
	if (outside.dimensions !== dimensions) {
		throw new RangeError(`dimensions differ: ${dimensions} and ${outside.dimensions}`);
	}
	const live = liveDimensions(momentsOf([cluster, outside], dimensions));
	const deadDimensions = [...Array(dimensions).keys()].filter((d) => !live.includes(d));
	const count = cluster.values.length / dimensions;
	const told = { dimensionsUsed: live.length, deadDimensions };
	const squared = mahalanobis(cluster, outside, live)?.sort();
	if (!squared) {
		const undefinedBecause = count <= live.length ? 'too-few-spikes' : 'singular';
		return { ...told, distance: NaN, lRatio: NaN, undefinedBecause };
	}
	if (squared.length === 0) {
		return { ...told, distance: NaN, lRatio: NaN, undefinedBecause: 'none-outside' };
	}
	let tails = 0;
	for (const d2 of squared) tails += chiSquaredUpperTail(d2, live.length);
	const isEnough = squared.length >= count;
	return {
		...told,
		distance: isEnough ? squared[count - 1] : NaN,
		lRatio: tails / count,
		undefinedBecause: isEnough ? null : 'fewer-outside'
	};
}
