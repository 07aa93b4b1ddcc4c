import { workerData } from 'node:worker_threads';
import type { BenchDay } from './simulate-day';
import { tasks, type TaskInput, type TaskName, type TaskOutput } from './tasks';

interface Order<T extends TaskName> {
	task: T;
	input: TaskInput<T>;
}

const day: BenchDay = Array.isArray(workerData) ? workerData[1] : workerData;

/** What a thread of the crew runs. */
export default function run<T extends TaskName>({ task, input }: Order<T>): TaskOutput<T> {
	const work = tasks[task] as (day: BenchDay, input: TaskInput<T>) => TaskOutput<T>;
	return work(day, input);
}
