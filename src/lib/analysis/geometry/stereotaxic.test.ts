import { describe, expect, it } from 'vitest';
import { referenceCase, worstDifference } from '../../../../tests/factories/reference';
import { seeded } from '../random/seeded';
import { angledApproach, type TiltPlane } from './angled-approach';
import { rotate, rotateBack, rotationOf } from './rotation';
import { skullFrame, toFrame, toSkull } from './skull-frame';
import { skullLevel } from './skull-level';
import { scaledToSkull, skullScale } from './skull-scale';
import { lengthOf, times, type StereotaxicPoint } from './stereotaxic-point';
import { directionByProjections, directionByTilt, tipPosition } from './track-direction';

type Triple = [number, number, number];
const FILE = '17_geometry.json';
const CHECKS = '00_checks.json';
const point = ([apMm, mlMm, dvMm]: Triple): StereotaxicPoint => ({ apMm, mlMm, dvMm });
const triple = ({ apMm, mlMm, dvMm }: StereotaxicPoint): Triple => [apMm, mlMm, dvMm];
const away = (got: StereotaxicPoint, want: Triple) => worstDifference(triple(got), want);
const random = seeded(17);
const between = (low: number, high: number) => low + (high - low) * random.next();
const anywhere = () => point([between(-9, 4), between(-5, 5), between(-1, 9)]);

describe('tip of a track', () => {
	it('lies along tilt and azimuth (worked by hand: 2.5 mm at 10° to the right)', () => {
		const { input, expected, tol } = referenceCase<
			{ entry: Triple; tilt: number; azimuth: number; depth: number },
			{ tip: Triple }
		>(CHECKS, 'h4');
		const direction = directionByTilt(input.tilt, input.azimuth);
		const tip = tipPosition(point(input.entry), direction, input.depth);
		expect(away(tip, expected.tip)).toBeLessThan(tol);
		expect(tip.mlMm).toBeCloseTo(2 + 2.5 * Math.sin(Math.PI / 18), 12);
	});

	it('agrees with scipy.spatial.transform.Rotation for every tilt and azimuth', () => {
		const { expected, tol } = referenceCase<
			unknown,
			{
				tiltDeg: number;
				azimuthDeg: number;
				depthMm: number;
				entry: Triple;
				direction: Triple;
				tip: Triple;
			}[]
		>(FILE, 'tip_from_entry');
		for (const row of expected) {
			const direction = directionByTilt(row.tiltDeg, row.azimuthDeg);
			expect(away(direction, row.direction)).toBeLessThan(tol);
			expect(away(tipPosition(point(row.entry), direction, row.depthMm), row.tip)).toBeLessThan(
				tol
			);
		}
	});

	it('is the same from two projected angles: tan α = tan θ cos φ, tan β = tan θ sin φ', () => {
		for (let round = 0; round < 50; round++) {
			const [tilt, azimuth] = [between(0, 60), between(-180, 180)];
			const slope = (share: number) =>
				(Math.atan(Math.tan((tilt * Math.PI) / 180) * share) * 180) / Math.PI;
			const phi = (azimuth * Math.PI) / 180;
			const projected = directionByProjections(slope(Math.cos(phi)), slope(Math.sin(phi)));
			expect(away(projected, triple(directionByTilt(tilt, azimuth)))).toBeLessThan(1e-12);
			expect(lengthOf(projected)).toBeCloseTo(1, 12);
		}
	});

	it('moves straight down without tilt, whatever the azimuth', () => {
		expect(away(directionByTilt(0, 123), [0, 0, 1])).toBeLessThan(1e-15);
		expect(triple(directionByProjections(0, 0))).toEqual([0, 0, 1]);
	});

	it('refuses a track that does not descend', () => {
		expect(() => directionByTilt(90, 0)).toThrow(RangeError);
		expect(() => directionByTilt(10, NaN)).toThrow(RangeError);
		expect(() => directionByProjections(0, -90)).toThrow(RangeError);
		expect(() => directionByProjections(NaN, 0)).toThrow(RangeError);
	});
});

describe('angledApproach', () => {
	it('enters beside the target by h tan θ (closed form, base R)', () => {
		const { input, expected, tol } = referenceCase<
			{ 'target ML,DV': [number, number]; angle: number },
			{ offset: number; entryML: number; path: number }
		>(CHECKS, 'h3');
		const [ml, dv] = input['target ML,DV'];
		const got = angledApproach(point([0, ml, dv]), 0, input.angle, 'coronal');
		expect(
			worstDifference(
				[got.offsetMm, got.entry.mlMm, got.pathMm],
				[expected.offset, expected.entryML, expected.path]
			)
		).toBeLessThan(tol);
	});

	it('agrees with the closed forms in both planes, to either side', () => {
		const { expected, tol } = referenceCase<
			unknown,
			{
				target: Triple;
				surfaceDv: number;
				angleDeg: number;
				plane: TiltPlane;
				entry: Triple;
				pathMm: number;
			}[]
		>(FILE, 'angled_approach');
		for (const row of expected) {
			const got = angledApproach(point(row.target), row.surfaceDv, row.angleDeg, row.plane);
			expect(away(got.entry, row.entry)).toBeLessThan(tol);
			expect(Math.abs(got.pathMm - row.pathMm)).toBeLessThan(tol);
		}
	});

	it('arrives: the tip one path from the entry along the angle is the target', () => {
		for (let round = 0; round < 50; round++) {
			const target = { ...anywhere(), dvMm: between(1, 9) };
			const angle = between(-50, 50);
			const surface = between(-1, 1);
			const side = angledApproach(target, surface, angle, 'sagittal');
			const front = angledApproach(target, surface, angle, 'coronal');
			const bySide = tipPosition(side.entry, directionByProjections(angle, 0), side.pathMm);
			const byFront = tipPosition(front.entry, directionByProjections(0, angle), front.pathMm);
			expect(away(bySide, triple(target))).toBeLessThan(1e-12);
			expect(away(byFront, triple(target))).toBeLessThan(1e-12);
		}
	});

	it('refuses a target above the surface and a level track', () => {
		expect(() => angledApproach(point([0, 2, 3]), 3, 10, 'coronal')).toThrow(RangeError);
		expect(() => angledApproach(point([0, 2, 3]), 0, 90, 'coronal')).toThrow(RangeError);
		expect(() => angledApproach(point([0, 2, NaN]), 0, 10, 'coronal')).toThrow(RangeError);
	});
});

describe('skullScale', () => {
	it('multiplies AP by measured over atlas distance (worked by hand)', () => {
		const { input, expected, tol } = referenceCase<
			{ measured: number; atlas: number; AP: number },
			{ F: number; AP: number }
		>(CHECKS, 'h5');
		const scale = skullScale(input.measured, input.atlas);
		expect(Math.abs(scale - expected.F)).toBeLessThan(tol);
		const got = scaledToSkull(point([input.AP, 2.5, 2]), scale, { ml: false, dv: false });
		expect(away(got, [expected.AP, 2.5, 2])).toBeLessThan(tol);
	});

	it('scales ML and DV only where the laboratory does', () => {
		const one = point([1, 1, 1]);
		expect(triple(scaledToSkull(one, 0.9, { ml: true, dv: false }))).toEqual([0.9, 0.9, 1]);
		expect(triple(scaledToSkull(one, 0.9, { ml: false, dv: true }))).toEqual([0.9, 1, 0.9]);
	});

	it.each([
		[8.4, 10],
		[11.6, 10]
	])('refuses %d mm against %d mm, unless a note says why', (measured, atlas) => {
		expect(() => skullScale(measured, atlas)).toThrow('0.85 to 1.15');
		expect(() => skullScale(measured, atlas, '  ')).toThrow(RangeError);
		expect(skullScale(measured, atlas, 'juvenile')).toBeCloseTo(measured / atlas, 12);
	});

	it('takes both ends of the range without a note', () => {
		expect(skullScale(8.5, 10)).toBe(0.85);
		expect(skullScale(11.5, 10)).toBe(1.15);
	});

	it('refuses a distance that is not above 0, with or without a note', () => {
		expect(() => skullScale(0, 9, 'why not')).toThrow(RangeError);
		expect(() => skullScale(9, 0, 'why not')).toThrow(RangeError);
		expect(() => skullScale(NaN, 9, 'why not')).toThrow(RangeError);
	});
});

describe('skullFrame', () => {
	const bregma = point([0, 0, 0]);

	it('turns a target with a skull whose nose points up (closed form, base R)', () => {
		const { input, expected, tol } = referenceCase<
			{ bregma: Triple; lambda: Triple; target: Triple },
			{ pitchDeg: number; frame: Triple }
		>(CHECKS, 'h6');
		const frame = skullFrame({ bregma: point(input.bregma), lambda: point(input.lambda) });
		expect(Math.abs(frame.pitchDeg - expected.pitchDeg)).toBeLessThan(tol);
		expect(frame.rollDeg).toBe(0);
		const got = toFrame(frame, point(input.target));
		expect(away(got, expected.frame)).toBeLessThan(tol);
		// By hand: x = −3.8 cos p + 2 sin p, z = 3.8 sin p + 2 cos p.
		const sinP = 0.3 / Math.hypot(9, 0.3);
		const cosP = Math.sqrt(1 - sinP * sinP);
		const byHand: Triple = [-3.8 * cosP + 2 * sinP, 2.5, 3.8 * sinP + 2 * cosP];
		expect(away(got, byHand)).toBeLessThan(1e-12);
	});

	it('agrees with scipy.spatial.transform.Rotation in pitch, roll, scale and both ways', () => {
		const { expected, tol } = referenceCase<
			unknown,
			{
				bregma: Triple;
				lambda_: Triple;
				left: Triple;
				right: Triple;
				atlasBregmaLambdaMm: number;
				measuredBregmaLambdaMm: number;
				scale: number;
				pitchDeg: number;
				rollDeg: number;
				matrix: number[][];
				atlasTarget: Triple;
				frameTargetUnscaled: Triple;
				frameTargetScaled: Triple;
				backToSkull: Triple;
			}[]
		>(FILE, 'bregma_lambda_tilt');
		for (const row of expected) {
			const frame = skullFrame({
				bregma: point(row.bregma),
				lambda: point(row.lambda_),
				sides: { left: point(row.left), right: point(row.right) }
			});
			const scale = skullScale(frame.bregmaLambdaMm, row.atlasBregmaLambdaMm);
			expect(
				worstDifference(
					[frame.bregmaLambdaMm, scale, frame.pitchDeg, frame.rollDeg],
					[row.measuredBregmaLambdaMm, row.scale, row.pitchDeg, row.rollDeg]
				)
			).toBeLessThan(tol);
			expect(worstDifference(frame.rotation, row.matrix.flat())).toBeLessThan(tol);
			const target = point(row.atlasTarget);
			const plain = toFrame(frame, target);
			expect(away(plain, row.frameTargetUnscaled)).toBeLessThan(tol);
			const scaled = scaledToSkull(target, scale, { ml: true, dv: true });
			expect(away(toFrame(frame, scaled), row.frameTargetScaled)).toBeLessThan(tol);
			expect(away(toSkull(frame, plain), row.backToSkull)).toBeLessThan(tol);
		}
	});

	it('gives the point back from frame to skull, for any skull', () => {
		for (let round = 0; round < 50; round++) {
			const origin = anywhere();
			const frame = skullFrame({
				bregma: origin,
				lambda: { ...origin, apMm: origin.apMm - 9, dvMm: origin.dvMm + between(-1, 1) },
				sides: { left: point([-4, -2, between(0, 0.5)]), right: point([-4, 2, between(0, 0.5)]) }
			});
			const place = anywhere();
			expect(away(toSkull(frame, toFrame(frame, place)), triple(place))).toBeLessThan(1e-12);
		}
	});

	it('puts lambda itself where it was measured when the skull has no yaw and no roll', () => {
		const lambda = point([-8.8, 0, -0.4]);
		const frame = skullFrame({ bregma, lambda });
		const onSkull = point([-frame.bregmaLambdaMm, 0, 0]);
		expect(away(toFrame(frame, onSkull), triple(lambda))).toBeLessThan(1e-12);
	});

	it('counts nose up and right side down as positive', () => {
		const sides = { left: point([-4, -2, 0]), right: point([-4, 2, 0.1]) };
		const frame = skullFrame({ bregma, lambda: point([-9, 0, 0.2]), sides });
		expect(frame.pitchDeg).toBeGreaterThan(0);
		expect(frame.rollDeg).toBeGreaterThan(0);
		const mirrored = { left: point([-4, -2, 0.1]), right: point([-4, 2, 0]) };
		const other = skullFrame({ bregma, lambda: point([-9, 0, -0.2]), sides: mirrored });
		expect(other.pitchDeg).toBeCloseTo(-frame.pitchDeg, 12);
		expect(other.rollDeg).toBeCloseTo(-frame.rollDeg, 12);
	});

	it('refuses points that are no skull', () => {
		const lambda = point([-9, 0, 0]);
		expect(() => skullFrame({ bregma, lambda: bregma })).toThrow('behind bregma');
		expect(() => skullFrame({ bregma: lambda, lambda: bregma })).toThrow('behind bregma');
		expect(() => skullFrame({ bregma, lambda: point([-9, NaN, 0]) })).toThrow('three numbers');
		const swapped = { left: point([-4, 2, 0]), right: point([-4, -2, 0]) };
		expect(() => skullFrame({ bregma, lambda, sides: swapped })).toThrow('left of');
		const steep = { left: point([-4, -0.1, 0]), right: point([-4, 0.1, 5]) };
		expect(() => skullFrame({ bregma, lambda: point([-9, 0, 4]), sides: steep })).toThrow('steep');
	});
});

describe('rotation', () => {
	it('is Ry · Rx without yaw (scipy.spatial.transform.Rotation)', () => {
		const { input, expected, tol } = referenceCase<
			{ pitch: number; roll: number; target: Triple },
			{ matrix: number[][]; frame: Triple }
		>(CHECKS, 'h7');
		const m = rotationOf(0, input.pitch, input.roll);
		expect(worstDifference(m, expected.matrix.flat())).toBeLessThan(tol);
		expect(away(rotate(m, point(input.target)), expected.frame)).toBeLessThan(tol);
	});

	it('equals intrinsic ZYX turns in scipy, and its transpose undoes it', () => {
		const { expected, tol } = referenceCase<
			unknown,
			{
				yawPitchRollDeg: Triple;
				matrix: number[][];
				point: Triple;
				rotated: Triple;
				inverse: Triple;
			}[]
		>(FILE, 'rotation_zyx');
		for (const row of expected) {
			const m = rotationOf(...row.yawPitchRollDeg);
			expect(worstDifference(m, row.matrix.flat())).toBeLessThan(tol);
			expect(away(rotate(m, point(row.point)), row.rotated)).toBeLessThan(tol);
			expect(away(rotateBack(m, point(row.point)), row.inverse)).toBeLessThan(tol);
		}
	});

	it('keeps every length', () => {
		for (let round = 0; round < 50; round++) {
			const m = rotationOf(between(-180, 180), between(-90, 90), between(-180, 180));
			const place = anywhere();
			expect(lengthOf(rotate(m, place))).toBeCloseTo(lengthOf(place), 12);
			expect(away(rotateBack(m, rotate(m, place)), triple(place))).toBeLessThan(1e-12);
		}
	});

	it('is linear and refuses an angle that is no number', () => {
		const m = rotationOf(12, 3, -4);
		const place = point([1, 2, 3]);
		expect(away(rotate(m, times(place, 3)), triple(times(rotate(m, place), 3)))).toBeLessThan(
			1e-12
		);
		expect(() => rotationOf(0, NaN, 0)).toThrow(RangeError);
	});
});

describe('skullLevel', () => {
	const bregma = point([0, 0, 5]);
	const sides = (left: number, right: number) => ({
		left: point([-4, -2, left]),
		right: point([-4, 2, right])
	});

	it('passes differences up to a tenth of a millimetre, as readings in hundredths give them', () => {
		// 5.1 − 5 and 1.1 − 1 lie a rounding error to either side of 0.1.
		expect(skullLevel({ bregma, lambda: point([-9, 0, 5.1]) }).isLevel).toBe(true);
		const shallow = { bregma: point([0, 0, 1]), lambda: point([-9, 0, 1.1]) };
		expect(skullLevel(shallow).isLevel).toBe(true);
		expect(skullLevel({ bregma, lambda: point([-9, 0, 5.11]) }).isLevel).toBe(false);
		expect(skullLevel({ bregma, lambda: point([-9, 0, 4.89]) }).isLevel).toBe(false);
	});

	it('holds the sides to the same and says which way each leans', () => {
		const lambda = point([-9, 0, 5.05]);
		const got = skullLevel({ bregma, lambda, sides: sides(5, 5.2) });
		expect(got.isLevel).toBe(false);
		expect(got.noseUpMm).toBeCloseTo(0.05, 12);
		expect(got.rightDownMm).toBeCloseTo(0.2, 12);
		expect(skullLevel({ bregma, lambda, sides: sides(5, 4.9) }).isLevel).toBe(true);
	});

	it('can be held to half of it, and leaves the sides open when nobody measured them', () => {
		const lambda = point([-9, 0, 5.06]);
		expect(skullLevel({ bregma, lambda }, 0.05).isLevel).toBe(false);
		expect(skullLevel({ bregma, lambda }).rightDownMm).toBeNaN();
		expect(() => skullLevel({ bregma, lambda }, -0.1)).toThrow(RangeError);
	});

	it('does not call a skull level whose heights are unknown', () => {
		expect(skullLevel({ bregma, lambda: point([-9, 0, NaN]) }).isLevel).toBe(false);
	});
});
