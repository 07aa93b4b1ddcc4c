/** Per cent of the baseline below which to look and to act. */
export interface WeightLimits {
	readonly warnPercent: number;
	readonly actPercent: number;
}

/** Common practice, to offer and not to apply: the approved protocol decides. */
export const USUAL_LIMITS: WeightLimits = { warnPercent: 85, actPercent: 80 };

/**
 * Where a percentage lies among the limits of the protocol; a weight on a limit is not below it.
 * @throws RangeError percent is no number, or act above warn
 */
export function weightBand(
	percent: number,
	{ warnPercent, actPercent }: WeightLimits
): 'fine' | 'warn' | 'act' {
	if (!Number.isFinite(percent)) throw new RangeError(`percentage is no number: ${percent}`);
	if (!(actPercent <= warnPercent)) {
		throw new RangeError(`act at ${actPercent} % lies above warn at ${warnPercent} %`);
	}
	if (percent < actPercent) return 'act';
	return percent < warnPercent ? 'warn' : 'fine';
}
