/** What the turn glyph draws for an amount of turning. */
export interface TurnArc {
	/** Whole turns besides the part drawn; 0 for a turn or less. */
	count: number;
	/** Part of the circle drawn, 1 to 16; 0 only when nothing was turned. */
	sixteenths: number;
	isBack: boolean;
}

/**
 * Any move shows at least one sixteenth: a glyph that looked empty would say
 * that nothing was turned. A round number of turns is a full circle.
 */
export function turnArc(turns: number): TurnArc {
	if (turns === 0 || Number.isNaN(turns)) return { count: 0, sixteenths: 0, isBack: false };
	const all = Math.max(1, Math.round(Math.abs(turns) * 16));
	const rest = all % 16;
	return {
		count: rest === 0 ? all / 16 : Math.floor(all / 16),
		sixteenths: rest === 0 ? 16 : rest,
		isBack: turns < 0
	};
}

/** Path of the wedge, clockwise from twelve, about (centre, centre); y grows downward. */
export function wedgePath(sixteenths: number, centre: number, radius: number): string {
	if (sixteenths <= 0) return '';
	const top = `M${centre} ${centre}V${centre - radius}`;
	if (sixteenths >= 16) {
		return `M${centre} ${centre - radius}a${radius} ${radius} 0 1 1 0 ${2 * radius}a${radius} ${radius} 0 1 1 0 ${-2 * radius}z`;
	}
	const angle = (sixteenths / 16) * 2 * Math.PI;
	const x = round(centre + radius * Math.sin(angle));
	const y = round(centre - radius * Math.cos(angle));
	return `${top}A${radius} ${radius} 0 ${sixteenths > 8 ? 1 : 0} 1 ${x} ${y}z`;
}

function round(value: number): number {
	return Math.round(value * 100) / 100;
}
