import { channels } from './tokens';

/** sRGB channel 0–255 to linear light 0–1 (IEC 61966-2-1). */
export function linearLight(channel: number): number {
	const c = channel / 255;
	return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
}

/** Relative luminance as WCAG 2.2 defines it, 0 for black to 1 for white. */
export function luminance(hex: string): number {
	const [r, g, b] = channels(hex);
	return 0.2126 * linearLight(r) + 0.7152 * linearLight(g) + 0.0722 * linearLight(b);
}

/** WCAG 2.2 contrast ratio, 1 to 21, whichever colour is in front. */
export function contrastRatio(a: string, b: string): number {
	const [dark, light] = [luminance(a), luminance(b)].sort((x, y) => x - y);
	return (light + 0.05) / (dark + 0.05);
}
