import type { Layer, LayerLandmark } from './layer-landmarks';

/** A layer with depths from the brain surface. */
export interface ExpectedLayer {
	readonly layer: Layer;
	readonly fromUm: number;
	readonly toUm: number;
}

/**
 * Depths from the surface at which layers are expected, in the order given. Layers known relative to
 * CA1 are counted from where CA1 was found; before that from both ends of its expected range, which
 * widens theirs.
 * @param ca1Um where the CA1 pyramidal layer was found in this animal, µm below the surface;
 *              CA1 itself is then expected there
 * @returns layers relative to CA1 are left out when nothing says where CA1 lies
 * @throws RangeError ca1Um not above 0
 */
export function expectedLayers(
	landmarks: readonly LayerLandmark[],
	ca1Um?: number
): ExpectedLayer[] {
	if (ca1Um !== undefined && !(ca1Um > 0)) {
		throw new RangeError(`CA1 must lie below the surface, got ${ca1Um} µm`);
	}
	const usual = landmarks.find(({ layer }) => layer === 'ca1-pyramidal');
	const ca1 = ca1Um === undefined ? usual : { fromUm: ca1Um, toUm: ca1Um };
	return landmarks.flatMap(({ layer, fromUm, toUm, below }): ExpectedLayer[] => {
		if (layer === 'ca1-pyramidal')
			return ca1 ? [{ layer, fromUm: ca1.fromUm, toUm: ca1.toUm }] : [];
		if (below === 'surface') return [{ layer, fromUm, toUm }];
		return ca1 ? [{ layer, fromUm: ca1.fromUm + fromUm, toUm: ca1.toUm + toUm }] : [];
	});
}
