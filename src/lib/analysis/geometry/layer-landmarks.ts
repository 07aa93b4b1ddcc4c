/** Layers that a drive passes on its way to and through the dorsal hippocampus. */
export type Layer =
	| 'cortex-bottom'
	| 'white-matter'
	| 'ca1-pyramidal'
	| 'hippocampal-fissure'
	| 'dentate-granule-upper'
	| 'dentate-hilus'
	| 'ca3-pyramidal';

/** Where a layer is expected, µm. */
export interface LayerLandmark {
	readonly layer: Layer;
	readonly fromUm: number;
	readonly toUm: number;
	/** `surface`: from the brain surface. `ca1`: from the CA1 pyramidal layer downward. */
	readonly below: 'surface' | 'ca1';
	/** All of these are habit, none was read in a source: a laboratory sets its own. */
	readonly status: 'common-practice';
}

const layer = (
	name: Layer,
	fromUm: number,
	toUm: number,
	below: LayerLandmark['below'] = 'surface'
): LayerLandmark => ({ layer: name, fromUm, toUm, below, status: 'common-practice' });

/**
 * Rough depths along a vertical track, for a laboratory to replace. Rat: dorsal hippocampus near
 * AP −3.8, ML 2.5. What is heard overrides every figure here: ripples are largest in the CA1
 * pyramidal layer, and the sharp wave changes sign below it.
 */
export const LAYER_LANDMARKS: Readonly<Record<'rat' | 'mouse', readonly LayerLandmark[]>> = {
	rat: [
		layer('cortex-bottom', 1200, 1500),
		layer('white-matter', 1600, 1900),
		layer('ca1-pyramidal', 1900, 2300),
		layer('hippocampal-fissure', 400, 600, 'ca1'),
		layer('dentate-granule-upper', 600, 800, 'ca1'),
		layer('dentate-hilus', 900, 1100, 'ca1'),
		layer('ca3-pyramidal', 3000, 3600)
	],
	mouse: [layer('ca1-pyramidal', 1100, 1400)]
};
