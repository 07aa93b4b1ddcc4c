import type { Arena, Piece, Point } from './arena';

/** The longest length an arena may have; beyond it a unit was surely mixed up. */
const LONGEST_CM = 100_000;

/** A description of an arena that cannot be read; the message says what was expected. */
export class ArenaError extends Error {
	override readonly name = 'ArenaError';
}

/**
 * Reads an arena description, lengths in cm: `straight:300`, `ring:250` (circumference),
 * `rectangle:100x80`, `disc:75` (diameter), `polyline:0,0;120,0;120,80` (corners, unbranched),
 * `tree:0,0>60,0;60,0>60,80` (straight pieces joined at shared points).
 * @throws ArenaError with a sentence for the person who typed it
 */
export function parseArena(text: string): Arena {
	const at = text.indexOf(':');
	const kind = at < 0 ? text.trim() : text.slice(0, at).trim();
	const rest = at < 0 ? '' : text.slice(at + 1).trim();
	switch (kind) {
		case 'straight':
			return { kind, lengthCm: length(rest, text) };
		case 'ring':
			return { kind, lengthCm: length(rest, text) };
		case 'disc':
			return { kind, diameterCm: length(rest, text) };
		case 'rectangle': {
			const sides = rest.split('x');
			if (sides.length !== 2) throw new ArenaError(`"${text}": write rectangle:WIDTHxHEIGHT in cm`);
			return { kind, widthCm: length(sides[0], text), heightCm: length(sides[1], text) };
		}
		case 'polyline':
			return polyline(rest, text);
		case 'tree':
			return tree(rest, text);
		default:
			throw new ArenaError(
				`"${text}" is no arena: write straight:, ring:, rectangle:, disc:, polyline: or tree: and its lengths in cm`
			);
	}
}

function number(part: string, text: string): number {
	const value = Number(part);
	if (part.trim() === '' || !Number.isFinite(value)) {
		throw new ArenaError(`"${text}": "${part.trim()}" is not a number`);
	}
	if (Math.abs(value) > LONGEST_CM) {
		throw new ArenaError(`"${text}": ${value} cm is too far; lengths are in cm`);
	}
	return value;
}

function length(part: string, text: string): number {
	const value = number(part, text);
	if (value <= 0) throw new ArenaError(`"${text}": a length must be above zero`);
	return value;
}

function point(part: string, text: string): Point {
	const both = part.split(',');
	if (both.length !== 2)
		throw new ArenaError(`"${text}": "${part}" is not a point, write X,Y in cm`);
	return { xCm: number(both[0], text), yCm: number(both[1], text) };
}

function gap(a: Point, b: Point): number {
	return Math.hypot(b.xCm - a.xCm, b.yCm - a.yCm);
}

function polyline(rest: string, text: string): Arena {
	const points = rest.split(';').map((part) => point(part, text));
	if (points.length < 2) throw new ArenaError(`"${text}": a polyline needs two points or more`);
	let lengthCm = 0;
	for (let i = 1; i < points.length; i++) {
		const piece = gap(points[i - 1], points[i]);
		if (piece === 0) throw new ArenaError(`"${text}": the same point stands twice in a row`);
		lengthCm += piece;
	}
	return { kind: 'polyline', points, lengthCm };
}

function tree(rest: string, text: string): Arena {
	const nodes: Point[] = [];
	const nodeOf = (found: Point) => {
		const known = nodes.findIndex((node) => gap(node, found) < 1e-6);
		return known >= 0 ? known : nodes.push(found) - 1;
	};
	const pieces: Piece[] = [];
	let lengthCm = 0;
	for (const part of rest.split(';')) {
		const ends = part.split('>');
		if (ends.length !== 2) throw new ArenaError(`"${text}": "${part}" is no piece, write X,Y>X,Y`);
		const from = nodeOf(point(ends[0], text));
		const to = nodeOf(point(ends[1], text));
		const piece = gap(nodes[from], nodes[to]);
		if (piece === 0) throw new ArenaError(`"${text}": "${part}" has no length`);
		pieces.push({ from, to, startCm: lengthCm, lengthCm: piece });
		lengthCm += piece;
	}
	if (!isJoined(nodes.length, pieces)) {
		throw new ArenaError(
			`"${text}": the pieces are not joined; neighbours must share a point exactly`
		);
	}
	return { kind: 'tree', nodes, pieces, lengthCm };
}

function isJoined(nodeCount: number, pieces: readonly Piece[]): boolean {
	const reached = new Set([0]);
	for (let round = 0; round < nodeCount; round++) {
		for (const { from, to } of pieces) {
			if (reached.has(from)) reached.add(to);
			else if (reached.has(to)) reached.add(from);
		}
	}
	return reached.size === nodeCount;
}
