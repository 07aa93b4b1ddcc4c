import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { clearOldServer, judgeNote, parsePostmasterNote, readPostmasterNote } from './postmaster';

const text = [
	'4711',
	'/lab/data',
	'1700000000',
	'5544',
	'',
	'127.0.0.1',
	'  123 45',
	'ready   ',
	''
];

describe('parsePostmasterNote', () => {
	it('reads process, port and readiness from their fixed lines', () => {
		expect(parsePostmasterNote(text.join('\n'))).toEqual({ pid: 4711, port: 5544, isReady: true });
	});

	it('is not ready while the server starts or before it wrote its status', () => {
		expect(parsePostmasterNote(text.with(7, 'starting').join('\n'))?.isReady).toBe(false);
		expect(parsePostmasterNote(text.slice(0, 4).join('\n'))?.isReady).toBe(false);
	});

	it.each(['', '\n\n', 'abc\n', '-3\n'])('finds no note in %j', (broken) => {
		expect(parsePostmasterNote(broken)).toBeUndefined();
	});
});

describe('judgeNote', () => {
	const note = { pid: 4711, port: 5544, isReady: true };
	it.each([
		['no such process', undefined, 'stale'],
		['the id now belongs to another program', '/usr/bin/node server.js', 'stale'],
		[
			'it is a server on another folder',
			'/usr/lib/postgresql/15/bin/postgres -D /other/data',
			'stale'
		],
		['it is our server', '/usr/lib/postgresql/15/bin/postgres -D /lab/data -c port=5544', 'running']
	])('when %s', (_, command, verdict) => {
		expect(judgeNote(note, '/lab/data', () => command)).toBe(verdict);
	});

	it('has nothing to judge without a note', () => {
		expect(judgeNote(undefined, '/lab/data', () => 'postgres -D /lab/data')).toBe('none');
	});
});

describe('clearOldServer', () => {
	it('removes a note whose process id a living program of another kind holds', async () => {
		const folder = mkdtempSync(join(tmpdir(), 'note-'));
		writeFileSync(join(folder, 'postmaster.pid'), text.with(0, String(process.pid)).join('\n'));
		await clearOldServer(folder);
		expect(readPostmasterNote(folder)).toBeUndefined();
		rmSync(folder, { recursive: true });
	});
});
