import { setTimeout as sleep } from 'node:timers/promises';
import { tryLock } from '../bootstrap/lock.mjs';
import { removeHome } from '../cluster/throw-away';
import { CHECKOUT, openHome, type Home } from '../home/home';
import { say } from '../machine/say';
import { childEnv, type WebPlace } from './child-env';
import { bringUpToDate, discardHalfFilled, fillOnce, openDatabase } from './database';
import { demoSignIns, fillDemo, firstAddress } from './first-run';
import { greeting } from './greeting';
import { waitForHealth } from './health';
import { keepRunning, type KeptProcess } from './kept-process';
import { listenForStop, type StopSignals } from './stop-signals';
import { webPort } from './web-port';

/** How one way of running (built, or with hot reload) differs from another. */
export interface Mode {
	name: 'start' | 'dev';
	/** Makes ready what the web process serves, while the database is being filled. */
	prepare(): Promise<WebProgram>;
	isTalkative: boolean;
	/** Called once everything runs; may restart the worker when its sources change. */
	watch?(worker: KeptProcess): () => void;
}

export interface WebProgram {
	command(web: WebPlace): string[];
	env: NodeJS.ProcessEnv;
}

interface Stoppable {
	stop(): Promise<void>;
	kill(): void;
}

/** Thrown into a start that is told to stop before it is done. */
class Stopped extends Error {}

/** Runs the whole lab until it is told to stop. A second run on the same home is told of the first. */
export async function runLab(mode: Mode): Promise<number> {
	const home = openHome();
	const lock = await takeHome(home, mode.name);
	if (!lock) return 0;

	// For tests: faster, without safety on a power cut, and gone at the end.
	const isThrowAway = process.env.QUARTERTURN_THROW_AWAY === '1';
	const running: Stoppable[] = [];
	const signals = listenForStop(() => {
		for (const { kill } of running) kill();
		lock.release();
		process.exit(130);
	});
	try {
		await startAll({ mode, home, isThrowAway, signals, running, tell: lock.update });
	} catch (error) {
		if (!(error instanceof Stopped)) throw error;
	} finally {
		// The database goes last: the others finish their work with it.
		const [database, ...users] = running;
		await Promise.all(users.map((part) => part.stop()));
		await database?.stop();
		lock.release();
		if (isThrowAway) removeHome(home);
	}
	// A step that was cut short (a build, a filling) must not hold the process up.
	process.exit(0);
}

interface Run {
	mode: Mode;
	home: Home;
	isThrowAway: boolean;
	signals: StopSignals;
	/** What has been started, the database first; the caller stops it. */
	running: Stoppable[];
	/** Writes beside the lock what others may know. */
	tell: (note: Record<string, string>) => void;
}

async function startAll({ mode, home, isThrowAway, signals, running, tell }: Run): Promise<void> {
	/** Ends early when a stop is asked for. */
	const step = <T>(work: Promise<T>): Promise<T> =>
		Promise.race([
			work,
			signals.asked.then((): never => {
				throw new Stopped();
			})
		]);

	const database = await step(openDatabase(home, isThrowAway));
	running.push(database);
	await step(discardHalfFilled(home, database));
	await step(bringUpToDate(home, database));

	const port = await step(webPort(process.env));
	const host = process.env.HOST || '127.0.0.1';
	const web: WebPlace = { port, host, address: `http://localhost:${port}` };
	const env = childEnv(home, database, web);
	const isDemo = process.env.DEMO !== '0';

	const [program] = await step(
		Promise.all([
			mode.prepare(),
			isDemo ? fillOnce(home, database, () => fillDemo(env)) : undefined
		])
	);
	const keep = (name: string, command: string[], extra: NodeJS.ProcessEnv = {}) => {
		const kept = keepRunning({
			name,
			command,
			env: { ...env, ...extra },
			cwd: CHECKOUT,
			logFile: home.logFile(name),
			isTalkative: mode.isTalkative
		});
		running.push(kept);
		return kept;
	};
	const worker = keep('worker', [process.execPath, 'src/commands/run.mjs', 'worker'], program.env);
	const pages = keep('web', program.command(web), program.env);
	const failure = Promise.race([pages.failed, worker.failed, database.failed]);
	failure.catch(() => undefined);
	await step(Promise.race([failure, waitForHealth(web.address)]));

	const address = process.env.ORIGIN || web.address;
	tell({ command: mode.name, address, port: String(port) });
	console.log(
		greeting(address, home, {
			signIns: await demoSignIns(database.ownerUrl),
			firstAddress: await firstAddress(env)
		})
	);
	const unwatch = mode.watch?.(worker);
	await Promise.race([failure, signals.asked]).finally(unwatch);
}

/**
 * Takes the home for this run. When a lab runs on it already, says where and gives nothing; while
 * another start or a command that borrows the database is under way, waits for it.
 */
async function takeHome(home: Home, command: string) {
	let hasSaid = false;
	for (;;) {
		const lock = tryLock(home.file('running.json'), { command });
		if ('release' in lock) return lock;
		const { note, pid } = lock.holder;
		if (note.address) {
			console.log(`Quarterturn is already running at ${note.address} (process ${pid}).`);
			return undefined;
		}
		if (!hasSaid) say(`"${note.command}" (process ${pid}) is using this lab; waiting for it …`);
		hasSaid = true;
		await sleep(300);
	}
}
