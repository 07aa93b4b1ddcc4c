/** Angles are degrees where people meet them and radians inside. */
export function radians(degrees: number): number {
	return (degrees * Math.PI) / 180;
}

export function degrees(angle: number): number {
	return (angle * 180) / Math.PI;
}
