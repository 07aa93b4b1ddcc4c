import type { Chance } from './chance';
import type { DaySize } from './sizes';

/**
 * Rates of all units on a grid of 1 cm, [grid point][unit], up to one common factor: 70 % fire in one
 * to three places, 15 % fast and hardly tuned, 15 % untuned.
 */
export function tuning(size: DaySize, chance: Chance): Float64Array {
	const { widthCm, heightCm, units } = size;
	const isTrack = size.binsY === 1;
	const points = widthCm * (isTrack ? 1 : heightCm);
	const rates = new Float64Array(points * units);
	for (let unit = 0; unit < units; unit++) {
		const kind = chance.uniform();
		const isPlaced = kind < 0.7;
		const isFast = !isPlaced && kind < 0.85;
		const base = isPlaced
			? 0.05 + 0.3 * chance.uniform()
			: isFast
				? 8 + 12 * chance.uniform()
				: 0.3 + 2 * chance.uniform();
		const count = isPlaced ? 1 + Math.floor(3 * chance.uniform()) : isFast ? 2 : 0;
		const fields = Array.from({ length: count }, () => ({
			xCm: widthCm * chance.uniform(),
			yCm: heightCm * chance.uniform(),
			sigmaCm: 6 + 8 * chance.uniform(),
			peak: isPlaced ? 5 + 15 * chance.uniform() : 0.3 * base
		}));
		for (let point = 0; point < points; point++) {
			const x = (point % widthCm) + 0.5;
			const y = isTrack ? heightCm / 2 : Math.floor(point / widthCm) + 0.5;
			let rate = base;
			for (const field of fields) {
				const away = isTrack ? 0 : y - field.yCm;
				const square = (x - field.xCm) ** 2 + away * away;
				rate += field.peak * Math.exp(-square / (2 * field.sigmaCm * field.sigmaCm));
			}
			rates[point * units + unit] = rate;
		}
	}
	return rates;
}
