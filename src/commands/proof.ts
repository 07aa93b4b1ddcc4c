import { readdirSync } from 'node:fs';
import { join, relative } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Refusal } from './bootstrap/refusal.mjs';
import { closingLine } from './checks/tally';
import { CHECKOUT } from './home/home';
import { openReport, type Proof } from './proof/report';

const FOLDER = join(CHECKOUT, 'tests/proof');

/** `npm run proof`: the long checks, all or those named; each leaves a report under tests/reports. */
export default async function proof(args: string[]): Promise<number> {
	const names = readdirSync(FOLDER)
		.filter((file) => file.endsWith('.ts'))
		.map((file) => file.slice(0, -'.ts'.length))
		.sort();
	const unknown = args.filter((name) => !names.includes(name));
	if (unknown.length > 0) {
		throw new Refusal(
			`There is no proof "${unknown.join('", "')}". Proofs: ${names.join(', ')}`,
			2
		);
	}
	let failed = 0;
	const chosen = args.length > 0 ? args : names;
	for (const name of chosen) if (!(await prove(name))) failed++;
	console.log(`\n${closingLine({ passed: chosen.length - failed, failed, skipped: 0 })}`);
	return failed > 0 ? 1 : 0;
}

async function prove(name: string): Promise<boolean> {
	const file = pathToFileURL(join(FOLDER, `${name}.ts`)).href;
	const { about, default: run } = (await import(file)) as Proof;
	console.log(`\n── ${name}: ${about}`);
	const report = openReport(about);
	const begun = performance.now();
	let isProved = true;
	try {
		await run(report);
	} catch (error) {
		isProved = false;
		const text = error instanceof Error ? (error.stack ?? error.message) : String(error);
		console.log(text);
		report.lastLines('It failed with', text, 30);
	}
	const seconds = (performance.now() - begun) / 1000;
	const kept = relative(CHECKOUT, report.write(name, isProved, seconds));
	console.log(`${isProved ? 'proved' : 'NOT PROVED'}  ${name}  ${seconds.toFixed(0)} s  ${kept}`);
	return isProved;
}
