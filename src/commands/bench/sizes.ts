/** How large a simulated day is. */
export interface DaySize {
	readonly minutes: number;
	readonly units: number;
	/** Position samples a second. */
	readonly hz: number;
	readonly binsX: number;
	/** 1 on a track. */
	readonly binsY: number;
	readonly widthCm: number;
	readonly heightCm: number;
}

/** A short session on a track, an hour in a box, and two hours of four hundred units. */
export const SIZES = {
	S: { minutes: 20, units: 40, hz: 30, binsX: 60, binsY: 1, widthCm: 180, heightCm: 10 },
	M: { minutes: 60, units: 120, hz: 30, binsX: 40, binsY: 40, widthCm: 100, heightCm: 100 },
	L: { minutes: 120, units: 400, hz: 60, binsX: 50, binsY: 50, widthCm: 100, heightCm: 100 }
} as const satisfies Record<string, DaySize>;

export type SizeName = keyof typeof SIZES;
