import { z } from 'zod';

/** A layer as expected along a site's track, with how sure one is of it. */
export const layerBandSchema = z
	.object({
		layer: z.string().trim().min(1).max(60),
		fromUm: z.number().min(-2000).max(20_000),
		toUm: z.number().min(-2000).max(20_000),
		uncertaintyUm: z.number().min(0).max(5000)
	})
	.refine((band) => band.toUm > band.fromUm, {
		message: 'The lower edge lies below the upper one.'
	});

export type LayerBand = z.infer<typeof layerBandSchema>;
