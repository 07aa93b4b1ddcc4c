import type { Step } from './advice';
import type { AdviceParameters } from './parameters';

/** One step outside lowering: ⅛ turn, kept within 30 to 50 µm on screws of other pitch. */
export function standardStep(pitchUm: number, { stepLowUm, stepHighUm }: AdviceParameters): Step {
	const um = Math.min(stepHighUm, Math.max(stepLowUm, pitchUm / 8));
	return { um, turns: um / pitchUm };
}
