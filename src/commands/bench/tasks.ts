import type { BenchDay } from './simulate-day';
import { countFolds, decodeFolds } from './decode-step';
import { countMaps, drawMaps } from './map-step';
import { shiftUnits } from './shift-step';
import { readPart } from './table-step';

/** What a thread of the crew can be asked to do. */
export const tasks = {
	'count-maps': countMaps,
	'draw-maps': drawMaps,
	'shift-units': shiftUnits,
	'count-folds': countFolds,
	'decode-folds': decodeFolds,
	'read-part': readPart
} satisfies Record<string, (day: BenchDay, input: never) => unknown>;

export type TaskName = keyof typeof tasks;
export type TaskInput<T extends TaskName> = Parameters<(typeof tasks)[T]>[1];
export type TaskOutput<T extends TaskName> = ReturnType<(typeof tasks)[T]>;
