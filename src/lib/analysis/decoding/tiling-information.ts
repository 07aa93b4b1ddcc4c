/**
 * Fisher information per axis about position, per cm², from many Gaussian fields spread evenly:
 * J = τ ρ A (2π)^(D/2) σ^(D−2). On a line τ (N/L) A √(2π)/σ; in the plane 2π τ ρ A, whatever the
 * width (Zhang and Sejnowski 1999).
 * @param windowS    τ
 * @param density    centres per cm (D = 1) or per cm² (D = 2)
 * @param peakHz     A
 * @param sigmaCm    width of a field
 * @param dimensions D
 */
export function tilingInformation(
	windowS: number,
	density: number,
	peakHz: number,
	sigmaCm: number,
	dimensions: 1 | 2
): number {
	return (
		windowS * density * peakHz * (2 * Math.PI) ** (dimensions / 2) * sigmaCm ** (dimensions - 2)
	);
}
