/** A channel changed when its impedance rose or fell by more than this factor (common practice). */
const CHANGED_BY = 2;

/**
 * Whether a channel changed by more than a factor of two since its last test, up or down.
 * False when either reading is unknown (NaN, 0 or below). Compare tests of one current and frequency.
 */
export function hasChanged(beforeKohm: number, nowKohm: number): boolean {
	if (!(beforeKohm > 0 && nowKohm > 0)) return false;
	return Math.max(beforeKohm, nowKohm) > CHANGED_BY * Math.min(beforeKohm, nowKohm);
}
