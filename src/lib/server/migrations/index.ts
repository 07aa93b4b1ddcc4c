import { peopleAndLog } from './0001-people-and-log';
import { animals } from './0002-animals';
import { implantsAndTurns } from './0003-implants-and-turns';
import { daysAndSessions } from './0004-days-and-sessions';
import { dataAndAnalyses } from './0005-data-and-analyses';
import type { Migration } from './migration';

/** In order. A new migration is a new file and a new last line here. */
export const migrations: Migration[] = [
	peopleAndLog,
	animals,
	implantsAndTurns,
	daysAndSessions,
	dataAndAnalyses
];
