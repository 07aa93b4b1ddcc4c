import type { LinePoint } from '$lib/components/chart/line-point';

const MOST_GROUPS = 20;

const quantile = (sorted: number[], share: number) =>
	sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];

/** Median error of the windows in each stretch of a track, with the middle half of the errors. */
export function errorByPlace(
	trueXCm: ArrayLike<number>,
	errorCm: ArrayLike<number>,
	fromCm: number,
	toCm: number,
	binCm: number
): LinePoint[] {
	const groups = Math.max(1, Math.min(MOST_GROUPS, Math.round((toCm - fromCm) / binCm)));
	const widthCm = (toCm - fromCm) / groups;
	const errors: number[][] = Array.from({ length: groups }, () => []);
	for (let w = 0; w < errorCm.length; w++) {
		if (Number.isNaN(errorCm[w])) continue;
		const at = Math.floor((trueXCm[w] - fromCm) / widthCm);
		errors[Math.max(0, Math.min(groups - 1, at))].push(errorCm[w]);
	}
	return errors.map((here, k) => {
		const sorted = here.toSorted((a, b) => a - b);
		const x = fromCm + (k + 0.5) * widthCm;
		if (sorted.length === 0) return { x, y: null, n: 0 };
		return {
			x,
			y: quantile(sorted, 0.5),
			interval: [quantile(sorted, 0.25), quantile(sorted, 0.75)],
			n: sorted.length
		};
	});
}
