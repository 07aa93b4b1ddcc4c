import type { MessagePort } from 'node:worker_threads';
import { tasks, type TaskInput, type TaskName, type TaskOutput } from './tasks/tasks';

interface Order<T extends TaskName> {
	task: T;
	input: TaskInput<T>;
	progress: MessagePort;
}

/** What a thread of the pool runs: one task, telling how far it is at most ten times a second. */
export default async function run<T extends TaskName>({
	task,
	input,
	progress
}: Order<T>): Promise<TaskOutput<T>> {
	let toldAt = 0;
	const tell = (share: number) => {
		const at = performance.now();
		if (at - toldAt < 100) return;
		toldAt = at;
		progress.postMessage(share);
	};
	try {
		return await tasks[task](input, tell);
	} finally {
		progress.close();
	}
}
