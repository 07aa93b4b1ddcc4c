/** Properties that a stand-alone SVG needs written on its elements. */
const kept = [
	'fill',
	'fill-opacity',
	'stroke',
	'stroke-opacity',
	'stroke-width',
	'stroke-dasharray',
	'stroke-linejoin',
	'font-family',
	'font-size',
	'font-weight',
	'text-anchor'
];

const svgSpace = 'http://www.w3.org/2000/svg';

function writeStyles(from: Element, to: Element): void {
	const style = getComputedStyle(from);
	for (const name of kept) {
		const value = style.getPropertyValue(name);
		if (value) to.setAttribute(name, value);
	}
	to.removeAttribute('class');
	Array.from(from.children).forEach((child, at) => writeStyles(child, to.children[at]));
}

/** Canvas layers below the drawing go in as images, at the place they have on screen. */
function canvasImages(root: Element, svg: SVGSVGElement): Element[] {
	const frame = svg.getBoundingClientRect();
	return Array.from(root.querySelectorAll('canvas'), (canvas) => {
		const place = canvas.getBoundingClientRect();
		const image = document.createElementNS(svgSpace, 'image');
		image.setAttribute('x', String(place.left - frame.left));
		image.setAttribute('y', String(place.top - frame.top));
		image.setAttribute('width', String(place.width));
		image.setAttribute('height', String(place.height));
		image.setAttribute('preserveAspectRatio', 'none');
		image.setAttribute('style', 'image-rendering: pixelated');
		image.setAttribute('href', canvas.toDataURL());
		return image;
	});
}

/**
 * The first plot below an element as SVG that stands alone: colours and fonts
 * written out, canvas layers embedded. Null when there is no plot.
 */
export function svgText(root: Element): string | null {
	const svg = root.querySelector<SVGSVGElement>('svg[data-plot]');
	if (!svg) return null;
	const copy = svg.cloneNode(true);
	if (!(copy instanceof SVGSVGElement)) return null;
	writeStyles(svg, copy);
	copy.setAttribute('xmlns', svgSpace);
	copy.removeAttribute('aria-hidden');
	copy.prepend(...canvasImages(root, svg));
	return new XMLSerializer().serializeToString(copy);
}

/** Hands text to the reader as a file. */
export function saveText(text: string, name: string, type: string): void {
	const address = URL.createObjectURL(new Blob([text], { type }));
	const link = document.createElement('a');
	link.href = address;
	link.download = name;
	link.click();
	URL.revokeObjectURL(address);
}
