import { degrees } from './angle';
import { rotate, rotateBack, rotationOf, type Rotation } from './rotation';
import { demandPoint, lengthOf, minus, plus, type StereotaxicPoint } from './stereotaxic-point';

/** Points of a skull as the frame reads them. */
export interface SkullPoints {
	readonly bregma: StereotaxicPoint;
	readonly lambda: StereotaxicPoint;
	/** Two points of the skull as far left and right of the midline. */
	readonly sides?: { readonly left: StereotaxicPoint; readonly right: StereotaxicPoint };
}

/** How a skull sits in the frame. */
export interface SkullFrame {
	/** Nose up, lambda lower than bregma, is positive. */
	readonly pitchDeg: number;
	/** Right side lower is positive; 0 when no sides were measured. */
	readonly rollDeg: number;
	readonly bregmaLambdaMm: number;
	readonly bregma: StereotaxicPoint;
	readonly rotation: Rotation;
}

/**
 * Tilt of a skull from measured points: pitch = asin((z_λ − z_β) / |λ − β|),
 * roll = asin((z_R − z_L) / (w · cos pitch)) with w the distance of the sides in space. Yaw cannot
 * be told from a midline that defines the axis and is taken as 0.
 * @throws RangeError a coordinate that is no number, lambda not behind bregma, left not left of
 *         right, or sides that stand too steep to be the two sides of a skull
 */
export function skullFrame({ bregma, lambda, sides }: SkullPoints): SkullFrame {
	demandPoint('bregma', bregma);
	demandPoint('lambda', lambda);
	if (!(lambda.apMm < bregma.apMm)) throw new RangeError('lambda must lie behind bregma');
	const back = minus(lambda, bregma);
	const bregmaLambdaMm = lengthOf(back);
	const pitch = Math.asin(back.dvMm / bregmaLambdaMm);
	let roll = 0;
	if (sides) {
		demandPoint('the left side', sides.left);
		demandPoint('the right side', sides.right);
		if (!(sides.left.mlMm < sides.right.mlMm)) {
			throw new RangeError('the left point must lie left of the right one');
		}
		const across = minus(sides.right, sides.left);
		roll = Math.asin(across.dvMm / (lengthOf(across) * Math.cos(pitch)));
		if (Number.isNaN(roll)) throw new RangeError('the sides stand too steep for this pitch');
	}
	const [pitchDeg, rollDeg] = [degrees(pitch), degrees(roll)];
	const rotation = rotationOf(0, pitchDeg, rollDeg);
	return { pitchDeg, rollDeg, bregmaLambdaMm, bregma, rotation };
}

/** Where a place of the skull (from bregma, along its own axes) lies in the frame. */
export function toFrame(frame: SkullFrame, ofSkull: StereotaxicPoint): StereotaxicPoint {
	return plus(frame.bregma, rotate(frame.rotation, ofSkull));
}

/** Where a place of the frame lies on the skull; undoes `toFrame`. */
export function toSkull(frame: SkullFrame, ofFrame: StereotaxicPoint): StereotaxicPoint {
	return rotateBack(frame.rotation, minus(ofFrame, frame.bregma));
}
