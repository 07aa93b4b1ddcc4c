import { describe, expect, it } from 'vitest';
import { readPersonAdd } from './person-add';
import { readTokenCreate } from './token-create';

const person = ['--email', 'a@lab.example', '--name', 'A B'];
const token = ['--email', 'a@lab.example', '--scope', 'write', '--days', '30'];

describe('person add', () => {
	it.each([
		['repeated', ['--role', 'pi', '--role', 'admin']],
		['after blanks', ['--role', 'pi', 'admin']],
		['after commas', ['--role', 'PI,admin']]
	])('takes roles %s', (_, roles) => {
		expect(readPersonAdd([...person, ...roles]).roles).toEqual(['pi', 'admin']);
	});

	it('refuses an unknown role and names the known ones', () => {
		expect(() => readPersonAdd([...person, '--role', 'king'])).toThrow(/no role "king".*observer/);
	});

	it.each([[person], [['--role', 'pi', '--name', 'A']], [[]]])('shows its usage for %j', (args) => {
		expect(() => readPersonAdd(args)).toThrow(/^Usage/);
	});
});

describe('token create', () => {
	it('reads its arguments', () => {
		expect(readTokenCreate(token)).toEqual({ email: 'a@lab.example', scope: 'write', days: 30 });
		expect(readTokenCreate([...token, '--name', 'rig 2']).name).toBe('rig 2');
	});

	it.each([
		['an unknown scope', token.with(3, 'all')],
		['days that are no number', token.with(5, 'ten')],
		['no days', token.slice(0, 4)],
		['half a day', token.with(5, '0.5')]
	])('shows its usage for %s', (_, args) => {
		expect(() => readTokenCreate(args)).toThrow(/^Usage/);
	});
});
