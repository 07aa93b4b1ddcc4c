/**
 * False alarms to expect of charts that stand still: each of them alarms once in its average run
 * length, so 16 bundles over 30 recorded days at a run length of 500 give about one.
 * @param charts    charts watched, one a bundle
 * @param days      recorded days
 * @param runLength average run length without a change, recorded days
 * @throws RangeError charts or days below 0, or a run length not above 0
 */
export function expectedFalseAlarms(charts: number, days: number, runLength: number): number {
	if (!(charts >= 0 && days >= 0)) throw new RangeError('charts and days must not be below 0');
	if (!(runLength > 0)) throw new RangeError(`run length must be above 0, got ${runLength}`);
	return (charts * days) / runLength;
}
