import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import process from 'node:process';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { recordingFile } from '../../tests/factories/recording';
import analyse from './analyse';

// Whole sessions are analysed here; a busy machine needs its time.
vi.setConfig({ testTimeout: 30_000 });

const track = (file: string) => recordingFile('ca1-linear-track', file);
const inputs = [
	...['--position', track('linear.csv'), '--spikes', track('spikes.csv')],
	...['--epochs', track('epochs.csv'), '--arena', 'straight:117', '--shuffles', '20']
];

let folder: string;
let out: string;
let err: string;

beforeEach(async () => {
	folder = await mkdtemp(join(tmpdir(), 'analyse-'));
	out = '';
	err = '';
	vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
		out += String(text);
		return true;
	});
	vi.spyOn(process.stderr, 'write').mockImplementation((text) => {
		err += String(text);
		return true;
	});
});

afterEach(async () => {
	vi.restoreAllMocks();
	await rm(folder, { recursive: true });
});

async function file(name: string, text: string): Promise<string> {
	const path = join(folder, name);
	await writeFile(path, text);
	return path;
}

describe('analyse', () => {
	it('prints the whole result as JSON, with digests of the files', async () => {
		expect(await analyse([...inputs, '--units', track('units.csv'), '--json', '-'])).toBe(0);
		const result = JSON.parse(out);
		expect(Object.keys(result)).toEqual([
			...['schema', 'parameters', 'inputs', 'occupancy', 'units', 'decoding', 'warnings'],
			...['codeVersion', 'startedAt', 'elapsedS']
		]);
		expect(result.schema).toBe('quarterturn/session-analysis@1');
		expect(result.inputs.position.sha256).toMatch(/^[0-9a-f]{64}$/);
		expect(result.decoding.medianErrorCm).toBeCloseTo(8.455, 3);
		expect(err).toBe('');
	});

	it('writes a file whole or not at all', async () => {
		const path = join(folder, 'result.json');
		expect(await analyse([...inputs, '--json', path])).toBe(0);
		expect(JSON.parse(await readFile(path, 'utf8')).units).toHaveLength(31);
		expect(await readdir(folder)).toEqual(['result.json']);
		expect(out).toBe('');
		expect(await analyse([...inputs, '--json', join(folder, 'no', 'result.json')])).toBe(2);
		expect(err).toContain('cannot be written');
	});

	it('prints a readable table otherwise', async () => {
		expect(await analyse(inputs)).toBe(0);
		expect(out).toContain('Decoding: 18 units, 1274 windows');
		expect(out).toMatch(/^ +14 +T01 +984 +595 /m);
	});

	it('refuses a bad row in one line that names file, row, column and reason', async () => {
		const position = await file('bad.csv', 't_s,x_cm\n0,1\n0.1,abc\n');
		expect(await analyse(['--position', position, ...inputs.slice(2), '--json', '-'])).toBe(2);
		expect(err).toBe(`${position}, row 3, column x_cm: "abc" is not a number\n`);
		expect(out).toBe('');
	});

	it('reads units, waveforms and features and tells quality by them', async () => {
		const units = await file('u.csv', 'unit,bundle,class,amplitude_uv,noise_uv\n11,T01,,,10\n');
		const waveforms = await file(
			'w.csv',
			'unit,channel,sample,uv\n11,1,0,0\n11,1,1,-80\n11,1,2,0\n11,1,3,20\n'
		);
		const rows = Array.from({ length: 60 }, (_, k) => {
			const unit = k % 3 === 0 ? '11' : '';
			const shift = unit ? 0 : 50;
			return `${k},T01,${unit},${shift + (k % 7)},${k % 5}`;
		});
		const features = await file('f.csv', `t_s,bundle,unit,f1,f2\n${rows.join('\n')}\n`);
		const more = ['--units', units, '--waveforms', waveforms, '--waveform-hz', '4000'];
		expect(await analyse([...inputs, ...more, '--features', features, '--json', '-'])).toBe(0);
		const found = JSON.parse(out).units.find(({ unit }: { unit: string }) => unit === '11');
		expect(found.quality).toMatchObject({
			signalToNoise: 5,
			troughToPeakMs: 0.5,
			featuresUsed: 2,
			deadFeatures: []
		});
		expect(found.quality.isolationDistance).toBeGreaterThan(20);
	});

	it.each([
		[['--spikes', 's.csv', '--arena', 'straight:1'], '--position is missing'],
		[[...inputs, '--arena', 'oval:3'], '--arena: "oval:3" is no arena'],
		[[...inputs, '--bin-cm', '0'], '--bin-cm: must be a number from 0.1 to 100, got 0'],
		[[...inputs, '--folds', 'ten'], '--folds: "ten" is not a number'],
		[[...inputs, '--prior', 'flat'], '--prior: must be even or time-spent'],
		[[...inputs, '--colour', 'red'], "Unknown option '--colour'"],
		[[...inputs, '--waveforms', 'w.csv'], '--waveforms and --waveform-hz go together'],
		[[...inputs, '--waveforms', 'w.csv', '--waveform-hz', '0'], '--waveform-hz: must be above 0'],
		[[...inputs, '--nwb', 'x.nwb'], '--nwb comes in a later version'],
		[['--position', '/nowhere/p.csv', ...inputs.slice(2)], '/nowhere/p.csv: there is no such file']
	])('%j is refused in one line', async (args, line) => {
		expect(await analyse(args)).toBe(2);
		expect(err).toContain(line);
		expect(err.trim().split('\n')).toHaveLength(1);
		expect(out).toBe('');
	});
});
