import { setTimeout as sleep } from 'node:timers/promises';
import type { Report } from '../../src/commands/proof/report';
import { makeDebianRoot, type DebianRoot } from './debian-root/debian-root';

export const about = 'A bare Debian with Node.js alone: `npm start`, `npm test`, and both again';

const START_PATIENCE_MS = 15 * 60_000;

export default async function bareDebian(report: Report): Promise<void> {
	const system = await makeDebianRoot();
	report.line(
		`Debian ${system.release} made with debootstrap, required packages only; added: Node.js ${process.version} and npm.`
	);
	try {
		for (const round of ['First', 'Second']) {
			await startAndStop(system, report, `${round} npm start`);
			await test(system, report, `${round} npm test`);
		}
	} finally {
		system.remove();
	}
}

async function startAndStop(system: DebianRoot, report: Report, title: string): Promise<void> {
	const begun = performance.now();
	const lab = system.run(['npm', 'start']);
	try {
		const address = await addressOf(lab.output, lab.ended);
		const seconds = ((performance.now() - begun) / 1000).toFixed(0);
		const signIn = await fetch(`${address}/sign-in`);
		const health = await fetch(`${address}/api/health`);
		report.line(
			`${title}: ready after ${seconds} s; /sign-in ${signIn.status}; /api/health ${health.status} ${await health.text()}`
		);
		if (signIn.status !== 200 || health.status !== 200) throw new Error(`${title}: not well`);
	} finally {
		const code = await lab.stop();
		report.lastLines(`${title}, what it printed (exit ${code})`, lab.output(), 25);
	}
}

/** Waits for the line that gives the address. */
async function addressOf(output: () => string, ended: Promise<number>): Promise<string> {
	let hasEnded = false;
	void ended.then(() => (hasEnded = true));
	const until = Date.now() + START_PATIENCE_MS;
	while (!hasEnded && Date.now() < until) {
		const address = /running at (http\S+)/.exec(output())?.[1];
		if (address) return address;
		await sleep(250);
	}
	throw new Error(`npm start ${hasEnded ? 'ended' : 'took too long'}:\n${output()}`);
}

async function test(system: DebianRoot, report: Report, title: string): Promise<void> {
	const begun = performance.now();
	const run = system.run(['npm', 'test']);
	const code = await run.ended;
	report.line(`${title}: exit ${code} after ${((performance.now() - begun) / 1000).toFixed(0)} s`);
	report.lastLines(`${title}, last lines`, run.output(), code === 0 ? 15 : 120);
	if (code !== 0) throw new Error(`${title} failed`);
}
