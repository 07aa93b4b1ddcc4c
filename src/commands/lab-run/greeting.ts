import { relative } from 'node:path';
import type { DemoSignIn } from '../../demo/sign-ins';
import type { Home } from '../home/home';

/** The few lines a person needs once everything runs. */
export function greeting(
	address: string,
	home: Home,
	extra: { signIns?: DemoSignIn[]; firstAddress?: string }
): string {
	const lines = ['', `Quarterturn is running at ${address}`];
	if (extra.signIns?.length) {
		lines.push('', 'Demo lab: invented people and animals, simulated data. Sign in as');
		const width = Math.max(...extra.signIns.map(({ email }) => email.length));
		for (const { email, password, roles } of extra.signIns) {
			lines.push(`  ${email.padEnd(width)}  ${password}  ${roles.join(', ')}`);
		}
	}
	if (extra.firstAddress) {
		lines.push('', 'The lab is empty. Make its first PI at', `  ${extra.firstAddress}`);
	}
	const logs = relative(process.cwd(), home.file('logs'));
	lines.push(
		'',
		`Ctrl-C stops it. Logs are in ${logs.startsWith('..') ? home.file('logs') : logs}`
	);
	return lines.join('\n');
}
