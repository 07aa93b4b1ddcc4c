import type { ImplantInput } from '$lib/schemas/implant';
import type { Actor } from '$lib/server/access';
import * as implants from '$lib/server/services/implants';
import { REFERENCE, TETRODES, type DemoAnimal } from './animals';
import { DESIGN } from './registers';

/** Where the bundle of 16 goes in: a square grid around one point, mm. */
const CENTRE = { apMm: -3.8, mlMm: 2.4 };
const SPACING_MM = 0.35;

/** Carriage of a demo tetrode: T07 hangs on C07. */
export const carriageOf = (bundle: string) => bundle.replace('T', 'C');

/** Sixteen tetrodes, each on a screw of its own, above CA1 of the invented rat. */
export async function addImplant(
	surgeon: Actor,
	animal: DemoAnimal,
	surgeryDate: string
): Promise<void> {
	const input: ImplantInput = {
		surgeryDate,
		driveDesign: DESIGN,
		drive: animal.driveSerial,
		note: 'Simulated.',
		sites: [
			{
				label: 'right dorsal CA1',
				targetLayer: 'CA1 pyramidal',
				layerBands: [
					{ layer: 'cortex', fromUm: 0, toUm: 1350, uncertaintyUm: 150 },
					{ layer: 'CA1 pyramidal', fromUm: 1850, toUm: 2150, uncertaintyUm: 150 }
				],
				carriages: TETRODES.map((label, i) => ({
					label: carriageOf(label),
					bundles: [
						{
							label,
							kind: 'tetrode',
							role: label === REFERENCE ? 'reference' : 'record',
							targetLayer: label === REFERENCE ? 'cortex' : 'CA1 pyramidal',
							channels: 4,
							entryApMm: rounded(CENTRE.apMm + (1.5 - Math.floor(i / 4)) * SPACING_MM),
							entryMlMm: rounded(CENTRE.mlMm + ((i % 4) - 1.5) * SPACING_MM),
							startDepthUm: 950,
							zero: 'dura',
							zeroUncertaintyUm: 100
						}
					]
				}))
			}
		]
	};
	await implants.create(surgeon, animal.code, input);
}

const rounded = (mm: number) => Math.round(mm * 1000) / 1000;
