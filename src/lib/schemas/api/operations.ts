import { getAnalysis, requestAnalysis } from './analyses';
import { createAnimal, getAnimal, listAnimals } from './animals';
import { getDay, putDay } from './days';
import { putSessionFile, putSortingFile } from './files';
import { createImplant } from './implants';
import type { Operation } from './operation';
import { listPeople } from './people';
import { createSession } from './sessions';
import { createSorting } from './sortings';
import { listTurns, recordTurn } from './turns';

/** Every call of this version, in the order of the document. */
export const operations: readonly Operation[] = [
	listAnimals,
	createAnimal,
	getAnimal,
	createImplant,
	listTurns,
	recordTurn,
	getDay,
	putDay,
	createSession,
	putSessionFile,
	createSorting,
	putSortingFile,
	requestAnalysis,
	getAnalysis,
	listPeople
];
