import { absent, formatNumber } from './number';

function withUnit(value: number | null, decimals: number, unit: string): string {
	const text = formatNumber(value, decimals);
	return text === absent ? text : `${text} ${unit}`;
}

/** Rats in whole grams, mice to a tenth. */
export function formatWeight(weightG: number | null): string {
	return withUnit(weightG, weightG !== null && weightG < 100 ? 1 : 0, 'g');
}

/** Depths and travel, whole micrometres. */
export function formatDepth(depthUm: number | null): string {
	return withUnit(depthUm, 0, 'µm');
}

/** Places and errors in the arena. */
export function formatCm(lengthCm: number | null, decimals = 1): string {
	return withUnit(lengthCm, decimals, 'cm');
}

export function formatRate(rateHz: number | null): string {
	return withUnit(rateHz, rateHz !== null && rateHz < 1 ? 2 : 1, 'Hz');
}

export function formatInformation(bitsPerSpike: number | null): string {
	return withUnit(bitsPerSpike, 2, 'bit/spike');
}

export function formatAmplitude(amplitudeUv: number | null): string {
	return withUnit(amplitudeUv, 0, 'µV');
}

/** A length of time: "42 s", "42 min", "1 h 05 min". */
export function formatDuration(durationS: number | null): string {
	if (durationS === null || Number.isNaN(durationS)) return absent;
	if (durationS < 60) return `${formatNumber(durationS, durationS < 10 ? 1 : 0)} s`;
	const minutes = Math.round(durationS / 60);
	if (minutes < 60) return `${minutes} min`;
	return `${Math.floor(minutes / 60)} h ${String(minutes % 60).padStart(2, '0')} min`;
}

const byteSteps = ['B', 'kB', 'MB', 'GB', 'TB'];

/** File sizes in steps of 1000, as drives and networks count them. */
export function formatBytes(bytes: number): string {
	const step = bytes < 1 ? 0 : Math.min(Math.floor(Math.log10(bytes) / 3), byteSteps.length - 1);
	const value = bytes / 1000 ** step;
	return `${formatNumber(value, step === 0 || value >= 100 ? 0 : 1)} ${byteSteps[step]}`;
}
