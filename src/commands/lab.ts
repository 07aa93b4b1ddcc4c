import { Refusal } from './bootstrap/refusal.mjs';
import { PERSON_ADD_USAGE, personAdd, readPersonAdd } from './lab/person-add';
import { readTokenCreate, TOKEN_CREATE_USAGE, tokenCreate } from './lab/token-create';
import { closeConnections, openConnections } from './lab-run/connections';
import { joinLab } from './lab-run/join-lab';

/** Words of the command line that a later version understands. */
const LATER: Record<string, string> = {
	backup: '0.8',
	restore: '0.8',
	export: '0.8',
	'verify-log': '0.8'
};

const USAGE = `Usage:
  npm run lab -- ${PERSON_ADD_USAGE}
  npm run lab -- ${TOKEN_CREATE_USAGE}`;

/** `npm run lab -- …`: what the lab's keeper does at the machine itself. */
export default async function lab(args: string[]): Promise<number> {
	const work = readWork(args);
	const leave = await joinLab();
	try {
		await openConnections();
		await work();
		return 0;
	} catch (error) {
		const { Refusal: Refused } = await import('$lib/server/errors');
		if (error instanceof Refused) throw new Refusal(error.message);
		throw error;
	} finally {
		await closeConnections();
		await leave();
	}
}

/** Reads the whole command line before anything is started. */
function readWork([subject = '', ...rest]: string[]): () => Promise<void> {
	if (subject in LATER) {
		throw new Refusal(
			`"lab ${subject}" comes with version ${LATER[subject]}; this version does not have it. Nothing was done. A backup is made before every update, in the backups folder of the lab's home.`,
			2
		);
	}
	const [verb, ...args] = rest;
	try {
		if (subject === 'person' && verb === 'add') {
			const input = readPersonAdd(args);
			return () => personAdd(input);
		}
		if (subject === 'token' && verb === 'create') {
			const input = readTokenCreate(args);
			return () => tokenCreate(input);
		}
	} catch (error) {
		// An option that Node's own reader of arguments does not know.
		if (error instanceof TypeError) throw new Refusal(`${error.message}\n${USAGE}`, 2);
		throw error;
	}
	throw new Refusal(USAGE, 2);
}
