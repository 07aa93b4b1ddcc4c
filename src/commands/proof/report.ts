import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { CHECKOUT } from '../home/home';
import { say } from '../machine/say';

/** What a proof saw, line by line; kept as a page under tests/reports. */
export interface Report {
	line(text: string): void;
	/** The last lines of a program's output. */
	lastLines(title: string, output: string, count?: number): void;
}

export interface KeptReport extends Report {
	/** @returns the file */
	write(name: string, isProved: boolean, seconds: number): string;
}

export function openReport(about: string): KeptReport {
	const lines: string[] = [];
	return {
		line(text) {
			say(`  ${text}`);
			lines.push(`- ${text}`);
		},
		lastLines(title, output, count = 15) {
			const tail = output.trimEnd().split('\n').slice(-count);
			lines.push('', `${title}:`, '', ...tail.map((line) => `    ${line}`), '');
		},
		write(name, isProved, seconds) {
			const folder = join(CHECKOUT, 'tests/reports');
			mkdirSync(folder, { recursive: true });
			const file = join(folder, `${name}.md`);
			const head = [
				`# ${about}`,
				'',
				`${isProved ? 'Proved' : 'NOT proved'}, ${new Date().toISOString()}, ${seconds.toFixed(0)} s, Node.js ${process.version}`,
				''
			];
			writeFileSync(file, `${[...head, ...lines].join('\n').trimEnd()}\n`);
			return file;
		}
	};
}

/** What each file of tests/proof exports. */
export interface Proof {
	about: string;
	/** Throws when what it set out to show does not hold. */
	default(report: Report): Promise<void>;
}
