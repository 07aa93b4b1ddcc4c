import { analyseTask, type AnalyseInput, type AnalyseOutput } from './analyse-task';
import { readTableTask, type ReadTableInput, type ReadTableOutput } from './read-table-task';

/** What threads can be asked to do. Inputs and outputs cross by structured clone. */
interface TaskTypes {
	analyse: { input: AnalyseInput; output: AnalyseOutput };
	'read-table': { input: ReadTableInput; output: ReadTableOutput };
}

export type TaskName = keyof TaskTypes;
export type TaskInput<T extends TaskName> = TaskTypes[T]['input'];
export type TaskOutput<T extends TaskName> = TaskTypes[T]['output'];

type Task<T extends TaskName> = (
	input: TaskInput<T>,
	tell: (share: number) => void
) => Promise<TaskOutput<T>>;

export const tasks: { [T in TaskName]: Task<T> } = {
	analyse: analyseTask,
	'read-table': readTableTask
};
