/**
 * Probability that a unit seen `daysBack` recorded days ago, and on none between, is seen today. Each day
 * a share `survival` of the cells stays and a share `missed` of those that are there is not seen. Not having
 * been seen speaks against being there, so this falls faster than survival alone: with 0.8 and 0.1 it is
 * 0.72, 0.21, 0.02 for one, two and three days.
 * @param daysBack whole, at least 1
 */
export function expectedPresence(daysBack: number, survival: number, missed: number): number {
	let isThere = survival;
	for (let day = 1; day < daysBack; day++) {
		const unseen = isThere * missed;
		isThere = (survival * unseen) / (unseen + 1 - isThere);
	}
	return isThere * (1 - missed);
}
