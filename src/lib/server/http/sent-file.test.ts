import { describe, expect, it } from 'vitest';
import { fileName } from './sent-file';

describe('fileName', () => {
	it.each([
		[null, null],
		['attachment', null],
		['attachment; filename=r031.npy', 'r031.npy'],
		['attachment; filename="day 1; run.csv"', 'day 1; run.csv'],
		['attachment; filename="a\\"b.csv"', 'a"b.csv'],
		["attachment; filename=x.csv; filename*=UTF-8''%C3%B8st.csv", 'øst.csv'],
		["attachment; filename*=utf-8'no'%C3%B8st.csv", 'øst.csv'],
		["attachment; filename=x.csv; filename*=UTF-8''%ff", null],
		['attachment; filename="../../etc/passwd"', 'passwd'],
		['attachment; filename="C:\\\\data\\\\r.csv"', 'r.csv'],
		['attachment; filename=""', null]
	])('reads %s as %s', (disposition, name) => {
		expect(fileName(disposition)).toBe(name);
	});
});
