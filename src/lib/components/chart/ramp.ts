import { linearLight } from '../ui/contrast';
import { channels, tokens, type Theme } from '../ui/tokens';

type Triple = [number, number, number];

/** Colours of the ramp, 256 steps of R, G, B, from nothing to the most. */
export type Ramp = Uint8ClampedArray;

const steps = 256;

/** Dark teal to cream: lightness rises all the way, so hue is never needed to read it. */
const anchors = ['#10242c', '#1b5263', '#2f8577', '#96bb5c', '#fdf6cf'];

/** sRGB to OKLab (Ottosson 2020), where equal distances look about equal. */
export function toOklab(rgb: Triple): Triple {
	const [r, g, b] = rgb.map(linearLight);
	const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b);
	const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b);
	const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b);
	return [
		0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
		1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
		0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s
	];
}

function gamma(light: number): number {
	const c = Math.min(1, Math.max(0, light));
	return 255 * (c <= 0.0031308 ? 12.92 * c : 1.055 * c ** (1 / 2.4) - 0.055);
}

function fromOklab([lightness, a, b]: Triple): Triple {
	const l = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
	const m = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
	const s = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
	return [
		gamma(4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s),
		gamma(-1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s),
		gamma(-0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s)
	];
}

/** Linear steps along the anchors in OKLab, spaced by the distance they cover. */
function daylightRamp(): Ramp {
	const points = anchors.map((hex) => toOklab(channels(hex)));
	const lengths = points.slice(1).map((p, i) => Math.hypot(...p.map((v, k) => v - points[i][k])));
	const total = lengths.reduce((sum, length) => sum + length, 0);
	return fill((share) => {
		let left = share * total;
		let leg = 0;
		while (leg < lengths.length - 1 && left > lengths[leg]) left -= lengths[leg++];
		const t = left / lengths[leg];
		const [from, to] = [points[leg], points[leg + 1]];
		const between = (k: 0 | 1 | 2) => from[k] + t * (to[k] - from[k]);
		return fromOklab([between(0), between(1), between(2)]);
	});
}

/** Black to the red ink with even steps of lightness (CIE 1976 L*). */
function redRamp(): Ramp {
	const ink = channels(tokens.red.ink).map(linearLight);
	const most = 0.2126 * ink[0] + 0.7152 * ink[1] + 0.0722 * ink[2];
	const mostLightness = 116 * Math.cbrt(most) - 16;
	return fill((share) => {
		const lightness = share * mostLightness;
		const light = lightness > 8 ? ((lightness + 16) / 116) ** 3 : lightness / 903.3;
		const scale = light / most;
		return [gamma(ink[0] * scale), gamma(ink[1] * scale), gamma(ink[2] * scale)];
	});
}

function fill(colour: (share: number) => Triple): Ramp {
	const ramp = new Uint8ClampedArray(steps * 3);
	for (let i = 0; i < steps; i++) ramp.set(colour(i / (steps - 1)), i * 3);
	return ramp;
}

const daylight = daylightRamp();
const red = redRamp();

/** The one ramp for maps and posteriors: the same in both lit themes, red in the red room. */
export function themeRamp(theme: Theme): Ramp {
	return theme === 'red' ? red : daylight;
}

/** CSS gradient of a ramp, for its legend. */
export function rampGradient(ramp: Ramp): string {
	const stops = Array.from({ length: 9 }, (_, i) => {
		const at = Math.round((i / 8) * (steps - 1)) * 3;
		return `rgb(${ramp[at]} ${ramp[at + 1]} ${ramp[at + 2]})`;
	});
	return `linear-gradient(to right, ${stops.join(', ')})`;
}
