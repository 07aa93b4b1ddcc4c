import type { AnalysisResult } from '$lib/analysis/session/analysis-result';
import type {
	DecodingResult,
	FieldResult,
	Figure,
	Place,
	QualityResult
} from '$lib/analysis/session/result';

/** A unit as the gallery and its table show it; its map comes with the arrays. */
export interface UnitView {
	/** Place in the result, and so in the arrays. */
	index: number;
	unit: string;
	bundle: string | null;
	spikes: number;
	spikesUsed: number;
	meanRateHz: Figure;
	peakRateHz: Figure;
	peakCm: Place | null;
	informationBitsPerSpike: Figure;
	informationP: Figure;
	splitHalfR: Figure;
	oddEvenR: Figure;
	fields: FieldResult[];
	/** Null in results made before quality was computed. */
	quality: QualityResult | null;
}

/** What a session's page needs of a result: all figures, and none of the long lists. */
export interface ResultView {
	units: UnitView[];
	decoding: DecodingResult;
	occupancy: { binsX: number; binsY: number; edgesXCm: number[]; edgesYCm: number[] | null };
	inputs: AnalysisResult['inputs'];
	parameters: AnalysisResult['parameters'];
	warnings: string[];
	startedAt: string;
	elapsedS: number;
}

/** Units in the order of their peaks along the track; those without a peak come last. */
export function toResultView(result: AnalysisResult): ResultView {
	const { occupancy } = result;
	const units = result.units.map((unit, index): UnitView => ({
		index,
		unit: unit.unit,
		bundle: unit.bundle,
		spikes: unit.spikes,
		spikesUsed: unit.spikesUsed,
		meanRateHz: unit.meanRateHz,
		peakRateHz: unit.peakRateHz,
		peakCm: unit.peakCm,
		informationBitsPerSpike: unit.informationBitsPerSpike,
		informationP: unit.informationP,
		splitHalfR: unit.splitHalfR,
		oddEvenR: unit.oddEvenR,
		fields: [...unit.fields],
		quality: unit.quality ?? null
	}));
	const along = ({ spikesUsed, peakCm }: UnitView) =>
		spikesUsed > 0 && peakCm ? peakCm[0] : Infinity;
	return {
		units: units.toSorted((a, b) => along(a) - along(b) || a.index - b.index),
		decoding: result.decoding,
		occupancy: {
			binsX: occupancy.binsX,
			binsY: occupancy.binsY,
			edgesXCm: [...occupancy.edgesXCm],
			edgesYCm: occupancy.edgesYCm && [...occupancy.edgesYCm]
		},
		inputs: result.inputs,
		parameters: result.parameters,
		warnings: [...result.warnings],
		startedAt: result.startedAt,
		elapsedS: result.elapsedS
	};
}
