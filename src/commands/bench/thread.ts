import { workerData } from 'node:worker_threads';
import { move, transferableSymbol, valueSymbol } from 'piscina';
import type { BenchDay } from './simulate-day';
import { tasks, type TaskInput, type TaskName, type TaskOutput } from './tasks';

interface Order<T extends TaskName> {
	task: T;
	input: TaskInput<T>;
}

const day: BenchDay = Array.isArray(workerData) ? workerData[1] : workerData;

/** What a thread of the crew runs; the numbers of its answer are handed over, not copied. */
export default function run<T extends TaskName>({ task, input }: Order<T>): unknown {
	const work = tasks[task] as (day: BenchDay, input: TaskInput<T>) => TaskOutput<T>;
	const output = work(day, input);
	return move({
		[transferableSymbol]: [...buffersIn(output)],
		[valueSymbol]: { output }
	});
}

/** Every piece of memory behind a value, once. */
function buffersIn(value: unknown, found = new Set<ArrayBuffer>()): Set<ArrayBuffer> {
	if (ArrayBuffer.isView(value)) {
		if (value.buffer instanceof ArrayBuffer) found.add(value.buffer);
	} else if (value !== null && typeof value === 'object') {
		for (const part of Object.values(value)) buffersIn(part, found);
	}
	return found;
}
