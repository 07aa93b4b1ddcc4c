import { afterEach, beforeEach, expect, test } from 'vitest';
import { forgetSettings } from '$lib/server/settings';
import { isOurs } from './same-origin';

beforeEach(() => {
	process.env.ORIGIN = 'https://notebook.example.org';
	forgetSettings();
});

afterEach(() => {
	delete process.env.ORIGIN;
	forgetSettings();
});

test.each([
	['the address people type', 'https://notebook.example.org', '10.0.0.7:5173'],
	['the machine itself by number', 'http://127.0.0.1:5173', '127.0.0.1:5173'],
	['the machine itself by name', 'http://localhost:5173', 'localhost:5173']
])('a form from %s is ours', (_, origin, host) => {
	expect(isOurs(origin, host)).toBe(true);
});

test.each([
	['another site', 'https://elsewhere.example', 'localhost:5173'],
	['another port of this machine', 'http://localhost:8080', 'localhost:5173'],
	['a sandboxed frame', 'null', 'localhost:5173'],
	['no page at all', null, 'localhost:5173']
])('a form from %s is foreign', (_, origin, host) => {
	expect(isOurs(origin, host)).toBe(false);
});
