import { fileURLToPath } from 'node:url';
import { Piscina } from 'piscina';
import type { BenchDay } from './simulate-day';
import { tasks, type TaskInput, type TaskName, type TaskOutput } from './tasks';

/** Threads that stay warm between repetitions. */
export interface Crew {
	readonly threads: number;
	/** Runs a task as often as there are threads, each time with its own input. */
	all<T extends TaskName>(
		task: T,
		input: (thread: number) => TaskInput<T>
	): Promise<TaskOutput<T>[]>;
	end(): Promise<void>;
}

/** Starts threads that all see one day. */
export function startCrew(threads: number, day: BenchDay): Crew {
	const pool = new Piscina({
		filename: fileURLToPath(new URL('./thread.ts', import.meta.url)),
		execArgv: ['--import', 'tsx'],
		workerData: day,
		minThreads: threads,
		maxThreads: threads
	});
	return {
		threads,
		all: (task, input) =>
			Promise.all(
				Array.from({ length: threads }, async (_, thread) => {
					const { output } = await pool.run({ task, input: input(thread) });
					return output;
				})
			),
		end: () => pool.destroy()
	};
}

/** No threads: everything is done at once, here. For work that is shorter than handing it over. */
export function crewOfOne(day: BenchDay): Crew {
	return {
		threads: 1,
		all: async <T extends TaskName>(task: T, input: (thread: number) => TaskInput<T>) => {
			const work = tasks[task] as (day: BenchDay, input: TaskInput<T>) => TaskOutput<T>;
			return [work(day, input(0))];
		},
		end: () => Promise.resolve()
	};
}
