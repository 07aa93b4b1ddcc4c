const MOST = 512;

/**
 * Labels as people list them: "T01-T16, R1" is T01, T02 … T16 and R1. The figures of a range keep
 * the width of its first label.
 * @throws RangeError with a sentence for the person who typed it
 */
export function expandLabels(text: string): string[] {
	const labels = text
		.split(/[\s,;]+/)
		.filter((part) => part !== '')
		.flatMap(expandPart);
	if (labels.length > MOST) throw new RangeError(`More than ${MOST} bundles; check the range.`);
	const repeated = labels.find((label, at) => labels.indexOf(label) !== at);
	if (repeated !== undefined) throw new RangeError(`“${repeated}” stands there twice.`);
	return labels;
}

function expandPart(part: string): string[] {
	const range = /^([A-Za-z_.]*)(\d+)[-–]([A-Za-z_.]*)(\d+)$/.exec(part);
	if (!range) {
		if (/^[A-Za-z0-9][A-Za-z0-9_.]{0,23}$/.test(part)) return [part];
		throw new RangeError(`“${part}” is no label. Write T07, or a range like T01-T16.`);
	}
	const [, prefix, first, otherPrefix, last] = range;
	const [from, to] = [Number(first), Number(last)];
	if (otherPrefix !== '' && otherPrefix !== prefix) {
		throw new RangeError(`“${part}” begins with ${prefix} and ends with ${otherPrefix}.`);
	}
	if (to < from) throw new RangeError(`“${part}” runs backwards.`);
	if (to - from >= MOST) throw new RangeError(`“${part}” is more than ${MOST} bundles.`);
	return Array.from(
		{ length: to - from + 1 },
		(_, n) => prefix + String(from + n).padStart(first.length, '0')
	);
}
