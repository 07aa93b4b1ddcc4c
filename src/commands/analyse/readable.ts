import type { AnalysisResult } from '../../lib/analysis/session/analysis-result';
import type { Figure } from '../../lib/analysis/session/result';

/** A session result as plain text: what was used, a row per unit, decoding, warnings. */
export function readable(result: AnalysisResult): string {
	const { parameters: p, inputs, occupancy, decoding } = result;
	const seconds = occupancy.secondsByBin.reduce<number>((sum, s) => sum + (s ?? 0), 0);
	const lines = [
		`Arena ${p.arena}, ${p.binCm} cm bins, ${p.smoothCm} cm smoothing, at least ${p.minSpeedCmS} cm/s (${p.defaults})`,
		`Positions: ${inputs.position.samples} over ${text(inputs.position.durationS, 1)} s, ${text(seconds, 1)} s used`,
		`Spikes: ${inputs.spikes.spikes} of ${inputs.spikes.units} units, ${inputs.spikes.outsidePosition} at moments without a position`,
		'',
		...unitTable(result),
		'',
		...decodingLines(decoding),
		...result.warnings.map((warning) => `Note: ${warning}`)
	];
	return lines.join('\n') + '\n';
}

function text(value: Figure, decimals: number): string {
	return value === null ? '–' : value.toFixed(decimals);
}

function units(count: number): string {
	return count === 1 ? '1 unit' : `${count} units`;
}

function unitTable(result: AnalysisResult): string[] {
	const head = ['unit', 'bundle', 'spikes', 'used', 'mean Hz', 'peak Hz', 'peak cm', 'bits/spike'];
	const rows = [
		[...head, 'p', 'half r', 'lap r', 'fields', 'contam.', 'isol. d', 'quality'],
		...result.units.map((u) => [
			u.unit,
			u.bundle ?? '–',
			String(u.spikes),
			String(u.spikesUsed),
			text(u.meanRateHz, 2),
			text(u.peakRateHz, 2),
			u.peakCm
				? u.peakCm
						.filter((cm) => cm !== null)
						.map((cm) => text(cm, 1))
						.join(' ')
				: '–',
			text(u.informationBitsPerSpike, 3),
			text(u.informationP, 3),
			text(u.splitHalfR, 2),
			text(u.oddEvenR, 2),
			String(u.fields.length),
			text(u.quality.contamination, 3),
			text(u.quality.isolationDistance, 1),
			u.quality.level === 'not-known' ? '–' : u.quality.level
		])
	];
	const widths = rows[0].map((_, c) => Math.max(...rows.map((row) => row[c].length)));
	return rows.map((row) => row.map((cell, c) => cell.padStart(widths[c])).join('  '));
}

function decodingLines(d: AnalysisResult['decoding']): string[] {
	if (d.medianErrorCm === null)
		return [`Decoding: none (${units(d.unitsUsed)}, ${d.windows} windows)`];
	const range = d.medianErrorCi95Cm
		? ` (95 % ${text(d.medianErrorCi95Cm[0], 1)} to ${text(d.medianErrorCi95Cm[1], 1)})`
		: '';
	return [
		`Decoding: ${units(d.unitsUsed)}, ${d.windows} windows`,
		`  median error ${text(d.medianErrorCm, 2)} cm${range}, chance ${text(d.chanceMedianErrorCm, 2)} cm, mean ${text(d.meanErrorCm, 2)} cm, 95th percentile ${text(d.p95ErrorCm, 1)} cm`,
		`  within 10 cm ${text(d.fractionWithin10Cm, 3)}, 95 % sets hold ${text(d.coverage95, 3)}, with memory ${text(d.memory.medianErrorCm, 2)} cm, floor ${text(d.floorMedianErrorCm, 2)} cm`,
		...d.worthByBundle.map(
			(b) =>
				`  without ${b.bundle} (${units(b.units)}): median error ${text(b.medianErrorWithoutCm, 2)} cm, ${text(b.bits, 3)} bits a window lost`
		),
		...d.unitDropCurve.map(
			(point) =>
				`  with ${units(point.units)}: median error ${text(point.medianErrorCm, 2)} cm (${text(point.p10, 1)} to ${text(point.p90, 1)})`
		)
	];
}
