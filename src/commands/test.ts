import { Refusal } from './bootstrap/refusal.mjs';
import { runSteps } from './checks/run-steps';
import { STEPS } from './checks/steps';

/** `npm test`: every check, or those named: `npm test -- unit database`. */
export default function test(args: string[]): Promise<number> {
	const unknown = args.filter((name) => !STEPS.some((step) => step.name === name));
	if (unknown.length > 0) {
		const names = STEPS.map(({ name, about }) => `  ${name.padEnd(10)} ${about}`).join('\n');
		throw new Refusal(`There is no step "${unknown.join('", "')}". Steps:\n${names}`, 2);
	}
	return runSteps(args.length > 0 ? STEPS.filter(({ name }) => args.includes(name)) : STEPS);
}
