import { median } from '../statistics/quantile';

/** Rotations tried: j twentieths of the series, j = 1 … 19. */
const PARTS = 20;

/**
 * Median error that the same answers would have at the wrong times: the decoded series is rotated
 * against the true one by j/20 of its length, and the median over j of the median errors is given.
 * That keeps where and how smoothly the decoder answers, and breaks the link to the moment.
 * @param count number of windows
 * @param error distance in cm between the answer of window `answered` and the place in window `at`
 * @returns NaN with under 20 windows
 */
export function chanceMedian(
	count: number,
	error: (answered: number, at: number) => number
): number {
	if (count < PARTS) return NaN;
	const medians = Float64Array.from({ length: PARTS - 1 }, (_, j) => {
		const shift = Math.floor(((j + 1) * count) / PARTS);
		return median(
			Float64Array.from({ length: count }, (_, w) => error((w - shift + count) % count, w))
		);
	});
	return median(medians);
}
